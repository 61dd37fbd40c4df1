import { setTimeout as sleep } from 'node:timers/promises';
import { run } from './run.mjs';

const APT_ATTEMPTS = 5;
const APT_PAUSE_MILLISECONDS = 5000;

/**
 * Installs Debian packages unless `isPresent` says that what is needed is there. `purpose` is the sentence that tells why
 * they are needed. Throws with what to install when it may not, or when installing did not help.
 */
export async function ensureDebianPackages(packages, { isPresent, purpose }) {
  if (await isPresent()) return;
  const wanted = packages.join(' ');
  const advice = `${purpose} Install: apt-get install ${wanted}`;
  if (process.getuid?.() !== 0)
    throw new Error(`${advice} (needs root; you are not root), then run the command again.`);
  process.stderr.write(`Installing ${wanted} (apt-get).\n`);
  await apt(['update'], advice);
  await apt(['install', '-y', '--no-install-recommends', ...packages], advice);
  if (!(await isPresent())) throw new Error(`${advice}; apt-get ended well and yet it is not there.`);
}

/** apt-get refuses at once while another run holds its lists, so a few attempts are made. */
async function apt(args, advice) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  for (let attempt = 1; ; attempt += 1) {
    const code = await run('apt-get', ['-q', '-o', 'DPkg::Lock::Timeout=300', ...args], {
      env,
      stdio: ['ignore', 2, 2],
    }).catch((error) => {
      if (error.code === 'ENOENT') throw new Error(`${advice}; apt-get is not here.`);
      throw error;
    });
    if (code === 0) return;
    if (attempt === APT_ATTEMPTS) throw new Error(`apt-get ${args.join(' ')} ended with exit code ${code}.`);
    await sleep(APT_PAUSE_MILLISECONDS);
  }
}
