const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);

if (major < 20 || (major === 20 && minor < 19)) {
  process.stderr.write(
    `Brakeven needs Node.js 20.19 or newer; this is ${process.version}. Install a newer one and try again.\n`,
  );
  process.exit(1);
}
