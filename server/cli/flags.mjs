import { Stop } from './say.mjs';

/** The switches of the start command: what follows the word, and what it means. */
const switches = {
  '--port': { name: 'port', value: 'N', means: 'listen on this port (4646)' },
  '--lan': { name: 'lan', means: 'listen on the network too, so that phones and other machines reach it' },
  '--data': { name: 'data', value: 'DIR', means: 'keep database, media and secrets here' },
  '--demo': { name: 'demo', means: 'offer the demo night; with --open, make it without asking' },
  '--open': { name: 'open', means: 'with --demo: make crew, lead and demo night unattended' },
  '--password': { name: 'password', value: 'WORDS', means: 'with --demo --open: the lead’s password' },
  '--help': { name: 'help', means: 'say this' },
};

/** The port that is listened on when nobody asks for another. */
export const usualPort = 4646;

/**
 * Reads the words after `npm start --`.
 * @param {string[]} words
 * @returns {{ port: number, data?: string, lan: boolean, demo: boolean, open: boolean, password?: string, help: boolean }}
 * @throws {Stop} code 2, with the word that was not understood
 */
export function readFlags(words, env = process.env) {
  const flags = {
    port: env.PORT ?? String(usualPort),
    data: env.LAMPYRID_DATA,
    lan: false,
    demo: false,
    open: false,
    help: false,
  };
  for (let at = 0; at < words.length; at += 1) {
    const [word, ...after] = words[at].split('=');
    const wanted = switches[word];
    if (!wanted) throw new Stop(`There is no switch ${word}.\n${help()}`, 2);
    if (!wanted.value) flags[wanted.name] = true;
    else {
      const value = after.length > 0 ? after.join('=') : words[++at];
      if (!value) throw new Stop(`${word} needs a value: ${word} ${wanted.value}`, 2);
      flags[wanted.name] = value;
    }
  }
  return { ...flags, port: portOf(flags.port) };
}

/** @param {string} text */
function portOf(text) {
  const port = Number(text);
  if (!Number.isInteger(port) || port < 1 || port > 65535)
    throw new Stop(`${text} is no port. Give a whole number from 1 to 65535.`, 2);
  return port;
}

/** The list of switches, one a line. */
export function help() {
  const lines = Object.entries(switches).map(
    ([word, { value = '', means }]) => `  ${`${word} ${value}`.padEnd(18)}${means}`,
  );
  return ['npm start -- [switches]', ...lines].join('\n');
}
