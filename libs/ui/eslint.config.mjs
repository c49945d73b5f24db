import { webConfig } from '../../tools/presets/eslint.base.mjs';

export default webConfig(import.meta.dirname);
