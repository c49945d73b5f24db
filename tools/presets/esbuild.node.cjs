/**
 * esbuild for the Node programs: main.js, and the workers named as additional entry points, side by side in one
 * folder whatever folder they come from. What is imported only when it is needed stands in files of its own, so that
 * a program starts without it.
 */
module.exports = {
  plugins: [
    {
      name: 'side-by-side',
      setup(build) {
        build.initialOptions.entryNames = '[name]';
        build.initialOptions.splitting = true;
        build.initialOptions.chunkNames = 'part-[hash]';
      },
    },
  ],
};
