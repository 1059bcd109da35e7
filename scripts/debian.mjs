// Debian's packages, where the user may install them.
import { spawnSync } from 'node:child_process';
import { inPath } from './path.mjs';
import { say, Trouble } from './say.mjs';

/**
 * Installs Debian packages, or says how. An index that is too old to find a package is read anew once.
 * @param {string[]} names
 * @param {string} purpose what they are for, as it follows "needed for"
 * @param {string} otherWay the way out for somebody who may not install
 */
export function installDebian(names, purpose, otherWay) {
  const list = names.join(' ');
  const byHand = `Install it with: apt-get install ${list}. ${otherWay}`;
  if (inPath('apt-get') === undefined) {
    throw new Trouble(`${list} is needed for ${purpose}, and this machine has no apt-get. ${byHand}`);
  }
  const asRoot = rootPrefix();
  if (asRoot === null) {
    throw new Trouble(`${list} is needed for ${purpose}, and this user may not install packages. ${byHand}`);
  }
  say(`installing Debian's ${list}, needed for ${purpose} …`);
  const install = ['apt-get', 'install', '-y', '--no-install-recommends', ...names];
  if (run([...asRoot, ...install]) === 0) return;
  run([...asRoot, 'apt-get', 'update']);
  if (run([...asRoot, ...install]) === 0) return;
  throw new Trouble(
    `apt-get could not install ${list}, needed for ${purpose}: see its lines above. ${byHand}`,
  );
}

function rootPrefix() {
  const quiet = ['env', 'DEBIAN_FRONTEND=noninteractive'];
  if (process.getuid?.() === 0) return quiet;
  const sudo = spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' });
  return sudo.status === 0 ? ['sudo', '-n', ...quiet] : null;
}

function run([command, ...rest]) {
  return spawnSync(command, rest, { stdio: ['ignore', 'ignore', 'inherit'] }).status;
}
