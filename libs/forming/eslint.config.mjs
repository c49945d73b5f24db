import { nodeConfig } from '../../tools/presets/eslint.base.mjs';

export default nodeConfig(import.meta.dirname);
