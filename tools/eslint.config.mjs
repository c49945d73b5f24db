import { nodeConfig } from './presets/eslint.base.mjs';

export default [{ ignores: ['demo-shop/**'] }, ...nodeConfig(import.meta.dirname)];
