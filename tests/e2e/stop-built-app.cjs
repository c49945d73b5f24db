/** Stops what serve-built-app.cjs has started. */
module.exports = () => globalThis.builtApp?.stop();
