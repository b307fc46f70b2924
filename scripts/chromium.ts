import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

const known = ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];

/** The browser that the journeys drive; installed from the distribution's packages when there is none. */
export function ensureChromium(): string {
  const found = process.env.CHROMIUM_PATH ?? known.find((file) => existsSync(file));
  if (found) return found;
  process.stderr.write('installing Chromium from the distribution’s packages\n');
  const asRoot = process.getuid?.() === 0 ? [] : ['sudo', '-n'];
  const install = 'apt-get install -y -qq --no-install-recommends chromium';
  const script = `export DEBIAN_FRONTEND=noninteractive; ${install} || { apt-get update -qq && ${install}; }`;
  const [program = 'sh', ...args] = [...asRoot, 'sh', '-c', script];
  const done = spawnSync(program, args, { stdio: ['ignore', 2, 2] });
  if (done.status !== 0 || !existsSync('/usr/bin/chromium')) {
    throw new Error('Chromium could not be installed: run  apt-get install chromium  or set CHROMIUM_PATH');
  }
  return '/usr/bin/chromium';
}
