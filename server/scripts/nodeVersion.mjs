// Read before anything else, so it keeps to syntax that old versions of Node understand too.

const needed = [20, 19, 4];

function isOlder(have, want) {
  for (let i = 0; i < want.length; i += 1) {
    if (have[i] !== want[i]) return have[i] < want[i];
  }
  return false;
}

/**
 * Ends the process with a sentence when this Node.js is too old or from another operating system than the scripts know.
 * A newer major version only gets a remark: nothing is known to break, but nothing was tried.
 */
export function checkNodeVersion() {
  const have = process.versions.node.split('.').map(Number);
  if (isOlder(have, needed)) {
    console.error('Dapple needs Node.js ' + needed.join('.') + ' or a newer 20; this is ' + process.version + '. Install Node.js 20 and run the same command again.');
    process.exit(1);
  }
  if (process.platform === 'win32') {
    console.error('Dapple runs on Debian and other Linux systems; on Windows, run it inside WSL.');
    process.exit(1);
  }
  if (have[0] > 20) console.error('Dapple is tried on Node.js 20; this is ' + process.version + '. If something fails, use Node.js 20.');
}
