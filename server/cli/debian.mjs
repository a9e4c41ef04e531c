import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { Stop, say } from './say.mjs';

const postgresRoot = '/usr/lib/postgresql';
const oldestPostgres = 15;

/** What the product needs from Debian: how to see that it's there, and the package that brings it. */
const parts = {
  postgresql: { name: 'PostgreSQL', isThere: () => installedPostgres().length > 0 },
  ffmpeg: { name: 'ffmpeg', isThere: () => isOnPath('ffmpeg') && isOnPath('ffprobe') },
  chromium: { name: 'Chromium', isThere: () => existsSync(process.env.CHROMIUM || '/usr/bin/chromium') },
};

/** Major versions of PostgreSQL here that are new enough, newest first. */
function installedPostgres() {
  if (!existsSync(postgresRoot)) return [];
  return readdirSync(postgresRoot)
    .map(Number)
    .filter((major) => major >= oldestPostgres && existsSync(join(postgresRoot, String(major), 'bin/initdb')))
    .sort((a, b) => b - a);
}

/**
 * PostgreSQL's folder of programs: the version that made `data`, or the newest when there is none yet.
 * @param {string} data
 */
export function postgresFolder(data) {
  const majors = installedPostgres();
  const file = join(data, 'PG_VERSION');
  const wanted = existsSync(file) ? Number(readFileSync(file, 'utf8')) : majors[0];
  if (wanted === undefined)
    throw new Stop(`PostgreSQL ${oldestPostgres} or newer is missing. ${byHand(['postgresql'])}`);
  if (!majors.includes(wanted))
    throw new Stop(
      `${data} was made by PostgreSQL ${wanted}, which is not here. Install it: apt-get install postgresql-${wanted}`,
    );
  return join(postgresRoot, String(wanted), 'bin');
}

/**
 * Installs what is missing when this account may, and says the one line to run otherwise.
 * @param {(keyof typeof parts)[]} wanted
 */
export function ensureParts(wanted) {
  const missing = wanted.filter((part) => !parts[part].isThere());
  if (missing.length === 0) return;
  const names = missing.map((part) => parts[part].name).join(', ');
  const prefix = rights();
  if (!prefix || !isOnPath('apt-get')) throw new Stop(`${names} is missing here. ${byHand(missing)}`);
  say(`Installing ${names} from Debian.`);
  const [program, ...words] = [...prefix, 'sh', '-c', installScript(missing)];
  const { status } = spawnSync(program, words, { stdio: ['ignore', 'ignore', 'inherit'], cwd: '/' });
  const left = missing.filter((part) => !parts[part].isThere());
  if (status !== 0 || left.length > 0)
    throw new Stop(`Debian's packages did not install. ${byHand(missing)}`);
}

/** @param {string[]} packages */
function byHand(packages) {
  return `Run this once, then try again:\n  sudo apt-get update && sudo apt-get install -y ${packages.join(' ')}`;
}

/** The words before a command that make it root's, or undefined when this account may not. */
function rights() {
  if (process.getuid?.() === 0) return [];
  return spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0 ? ['sudo', '-n'] : undefined;
}

/**
 * The shell text that installs packages. PostgreSQL's package would start a server of its own on port 5432: its setting
 * for that is off meanwhile and put back whatever happens.
 * @param {string[]} packages
 */
export function installScript(packages) {
  const install = 'apt-get install -y -q --no-install-recommends';
  const first = packages.includes('postgresql') ? ['postgresql-common'] : packages;
  const lines = [
    'set -e',
    'export DEBIAN_FRONTEND=noninteractive',
    `${install} ${first.join(' ')} || { apt-get update -q; ${install} ${first.join(' ')}; }`,
  ];
  if (first === packages) return lines.join('\n');
  return [
    ...lines,
    'conf=/etc/postgresql-common/createcluster.conf',
    'kept=$(mktemp)',
    'cp -p "$conf" "$kept"',
    `trap 'cp -p "$kept" "$conf"; rm -f "$kept"' EXIT`,
    `echo 'create_main_cluster = false' >> "$conf"`,
    `${install} ${packages.join(' ')}`,
  ].join('\n');
}

/** @param {string} program */
function isOnPath(program) {
  return (process.env.PATH ?? '').split(delimiter).some((folder) => existsSync(join(folder, program)));
}
