module.exports = require('../../tools/presets/jest.web.cjs')(__dirname, 'web');
