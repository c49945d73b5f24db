/** Angular's development server hands what belongs to the API on to it; tools/dev.mjs sets the address. */
export default {
  '/api': { target: process.env.API_ADDRESS ?? 'http://127.0.0.1:4180' },
};
