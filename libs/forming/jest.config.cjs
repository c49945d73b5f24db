module.exports = require('../../tools/presets/jest.node.cjs')(__dirname, 'forming');
