import { createHash, randomBytes, randomInt } from 'node:crypto';

/** Words that are heard well over a loud room; all of four letters, all different by more than one sound. */
export const pairingWords = [
  'MOTH',
  'LAMP',
  'REEF',
  'FERN',
  'DUNE',
  'KELP',
  'SALT',
  'MAST',
  'OTTO',
  'WREN',
  'PLUM',
  'ECHO',
  'IRIS',
  'JADE',
  'BARN',
  'CLAY',
  'DRUM',
  'FOAM',
  'GLEN',
  'HARP',
  'INCH',
  'KITE',
  'LIMB',
  'MINT',
  'NEST',
  'OPAL',
  'PIER',
  'QUAY',
  'ROPE',
  'SILK',
  'TIDE',
  'VANE',
  'WOLF',
  'YARN',
  'ZINC',
  'ARCH',
  'BEAM',
  'CROW',
  'DOCK',
  'FLAX',
  'GULL',
  'HUSK',
  'IVES',
  'JUNE',
  'KNOT',
  'LOAM',
  'MULE',
  'NOON',
  'OVAL',
  'POND',
  'RUST',
  'SWAN',
  'TURF',
  'URNS',
  'VOLT',
  'WAXY',
  'ACRE',
  'BOLT',
  'CHIP',
  'DUSK',
  'FROG',
  'GRID',
  'HAZE',
  'LOFT',
] as const;

/** A joining code in two spoken parts, such as `MOTH 2741`: 64 words × 10 000 numbers, 19.3 bits, from a CSPRNG. */
export function newCode(): string {
  const word = pairingWords[randomInt(pairingWords.length)];
  return `${word} ${String(randomInt(10_000)).padStart(4, '0')}`;
}

/** 256 random bits as base64url. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

/** What is kept of a secret: its sha256, hex. Secrets have 256 bits, so no salt or slow hash is wanted. */
export const hashOf = (secret: string): string => createHash('sha256').update(secret).digest('hex');

/** Short random id. */
export const newId = (): string => randomBytes(9).toString('base64url');
