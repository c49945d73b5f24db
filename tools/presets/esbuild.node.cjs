/**
 * esbuild for the Node programs: main.js, and the workers named as additional entry points, side by side in one
 * folder whatever folder they come from.
 */
module.exports = {
  plugins: [
    {
      name: 'side-by-side',
      setup(build) {
        build.initialOptions.entryNames = '[name]';
      },
    },
  ],
};
