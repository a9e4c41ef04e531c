import type { DemoClip } from '#server/services/demo/tools';

/** Every clip turns once in this time, so its last frame leads into its first. */
export const demoClipShape = { width: 960, height: 540, seconds: 8, fps: 25 } as const;

const { width, height, seconds, fps } = demoClipShape;
/** One turn of the loop, in radians, as ffmpeg's expressions know it. */
const turn = `(2*PI*T/${seconds})`;

/**
 * A grey picture by formula. Formulas are slow and this light is soft, so it is drawn small and seldom; pictures between
 * are mixed. One second is drawn on either side and cut off, so that the mixing is right at the seam too.
 * @param often pictures a second
 */
const formula = (w: number, h: number, often: number, lum: string): string =>
  [
    `nullsrc=s=${w}x${h}:r=${often}:d=${seconds + 2}`,
    'format=gray',
    `geq=lum='${lum}'`,
    `framerate=fps=${fps}:interp_start=0:interp_end=255:scene=100`,
    `trim=start=1:duration=${seconds}`,
    'setpts=PTS-STARTPTS',
    'format=gray',
  ].join(',');

const enlarged = (flags: string): string => `scale=${width}:${height}:flags=${flags}`;

/** Grey to colours: a straight run from dark over main to bright, a channel at a time. `at` is where main lies, 0..255. */
const coloured = (stops: readonly (readonly [r: number, g: number, b: number])[], at: number): string => {
  const [dark, main, bright] = stops;
  const channel = (i: 0 | 1 | 2): string => {
    const [a, b, c] = [dark?.[i] ?? 0, main?.[i] ?? 0, bright?.[i] ?? 0];
    return `'if(lt(val,${at}),${a}+(${b - a})*val/${at},${b}+(${c - b})*(val-${at})/${255 - at})'`;
  };
  return `format=rgb24,lutrgb=r=${channel(0)}:g=${channel(1)}:b=${channel(2)}`;
};

/** Light that the moved surface of water throws on a wall: a net of bright threads, brighter where two nets meet. */
const waterLight = (): string => {
  const net = (k: number, lean: number, way: number): string => {
    const x = `(X/H*${k}+${lean}*Y/H*${k})`;
    const y = `(Y/H*${k}-${lean}*X/H*${k})`;
    const u = `${x}+0.9*sin(${y}*1.3+${way}*${turn})+0.5*sin(${y}*2.1-${x}*0.7+${lean}*9-${turn})`;
    const v = `${y}+0.9*sin(${x}*1.1-${way}*${turn}+${lean}*5)+0.5*sin(${x}*1.9+${y}*0.8+${turn})`;
    return `exp(-3.4*abs(sin(${u})+sin(${v})))`;
  };
  const deep = `0.55+0.45*sin(X/W*3.1+Y/H*1.7+${turn})`;
  const lum = `255*min(1,(0.72*${net(4.2, 0.35, 1)}+0.45*${net(6.9, -0.28, -1)})*(${deep})+0.04)`;
  const colours = coloured(
    [
      [1, 9, 16],
      [20, 116, 122],
      [232, 255, 240],
    ],
    128,
  );
  return `${formula(240, 135, 10, lum)},${enlarged('bicubic')},${colours}`;
};

/** A number 0..1 that stays with a cell. */
const chance = (salt: number): string => `mod(abs(sin(ld(0)*12.9898+ld(1)*78.233+${salt})*43758.5453),1)`;

/** Salt as it grows: square pyramids in steps, each facet catching the light in its own time. */
const saltCrystals = (): string => {
  const sheet = (cell: number, lean: number, salt: number, strong: number): string => {
    const [cos, sin] = [Math.cos(lean).toFixed(4), Math.sin(lean).toFixed(4)];
    const x = `((X*${cos}+Y*${sin})/${cell})`;
    const y = `((Y*${cos}-X*${sin})/${cell}+40)`;
    // 0, 1: cell; 2, 3: place in it from a middle of its own; 4: half width; 5: distance as a square sees it, 0..1.
    const lum = [
      `st(0,floor(${x}))`,
      `st(1,floor(${y}))`,
      `st(4,0.16+0.3*${chance(salt + 3)})`,
      `st(2,${x}-ld(0)-0.5-0.12*(${chance(salt + 5)}-0.5))`,
      `st(3,${y}-ld(1)-0.5-0.12*(${chance(salt + 7)}-0.5))`,
      'st(5,max(abs(ld(2)),abs(ld(3)))/ld(4))',
      // 6: which facet, as an angle; 7: the slow light that passes over this crystal.
      'st(6,if(gt(abs(ld(2)),abs(ld(3))),if(gt(ld(2),0),0,2),if(gt(ld(3),0),1,3)))',
      `st(7,pow(0.5+0.5*cos(${turn}-6.283*${chance(salt + 11)}-ld(6)*0.55),3))`,
      `${strong}*255*lt(ld(5),1)*(0.05+0.95*ld(7))*(0.3+0.7*pow(mod(ld(5)*5,1),2))*(1-0.45*ld(5))`,
    ];
    return lum.join(';');
  };
  const colours = coloured(
    [
      [5, 6, 12],
      [96, 128, 150],
      [255, 246, 226],
    ],
    120,
  );
  const near = `${formula(420, 236, 2, sheet(58, 0.34, 1, 1))}[near]`;
  const far = `${formula(420, 236, 2, sheet(27, -0.5, 29, 0.55))}[far]`;
  return `${near};${far};[near][far]blend=all_mode=screen,${enlarged('lanczos')},${colours}`;
};

/** Static slowed down until it is weather: grains that brighten and fade in seconds, in bands that drift. */
const slowStatic = (): string => {
  const grain = [
    'st(0,X)',
    'st(1,Y)',
    `st(2,${chance(2)})`,
    `st(3,pow(0.5+0.5*cos((1+floor(2*${chance(8)}))*${turn}+6.283*ld(2)),3))`,
    `st(4,0.5+0.5*sin(Y/H*9+1.4*sin(X/W*4+${turn})-${turn}))`,
    `st(5,0.5+0.5*sin(X/W*5-Y/H*2+1.1*sin(Y/H*6-${turn})+${turn}))`,
    '255*min(1,ld(3)*pow(ld(2),1.6)*(0.1+1.3*ld(4)*ld(5))+0.16*ld(4)*ld(5))',
  ].join(';');
  const colours = coloured(
    [
      [7, 5, 10],
      [170, 78, 44],
      [255, 232, 190],
    ],
    140,
  );
  return `${formula(320, 180, 2, grain)},${enlarged('neighbor')},${colours}`;
};

/** Cider that is poured slowly: amber ribbons that turn over each other. */
const ciderPour = (): string => {
  const lum = `255*pow(0.5+0.5*sin(Y/H*4.5+2.2*sin(X/W*4.6+${turn})+1.1*sin(X/W*10.3-Y/H*3.8+2*${turn})),1.6)`;
  const colours = coloured(
    [
      [10, 4, 2],
      [158, 66, 12],
      [255, 204, 107],
    ],
    128,
  );
  return `${formula(160, 90, 10, lum)},${enlarged('bicubic')},gblur=sigma=3,${colours}`;
};

/** Filter graphs of our own, each ending in one picture. Nothing in them turns faster than twice in eight seconds. */
export const demoClips: Record<DemoClip, string> = {
  'water light': waterLight(),
  'salt crystals': saltCrystals(),
  'slow static': slowStatic(),
  'cider pour': ciderPour(),
};
