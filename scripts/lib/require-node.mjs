/**
 * Imported first, for its effect: everything after it may rely on Node 20.19. It uses nothing an older Node
 * would not understand, so that the message appears instead of a syntax error.
 */
const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);

if (major < 20 || (major === 20 && minor < 19)) {
  console.error(
    `Agraffe needs Node 20.19 or newer; this is Node ${process.versions.node}. Install a newer Node and try again.`,
  );
  process.exit(1);
}
