/** Pictures of the demo night as SVG, drawn by us. Words in them are paths: a bare Debian has no fonts. */

const cream = '#fff1d6';
const amber = '#f0a040';

/** A letter drawn with one even stroke in a box 100 high. */
type Glyph = readonly [path: string, width: number];
const blank: Glyph = ['', 0];
const letters: Record<string, Glyph> = {
  O: ['M50 0a50 50 0 1 0 .1 0Z', 100],
  T: ['M0 0H84M42 0V100', 84],
  E: ['M68 0H0V100H68M0 50H56', 68],
  R: ['M0 100V0H42a29 29 0 0 1 0 58H0M40 58L76 100', 76],
  G: ['M88 18A50 50 0 1 0 100 54H62', 100],
  A: ['M0 100L44 0L88 100M16 66H72', 88],
  C: ['M88 18A50 50 0 1 0 88 82', 88],
  I: ['M0 0V100', 0],
  D: ['M0 0V100H38a50 50 0 0 0 0 -100Z', 88],
};

/** A line of letters about x = 0, as one path each. */
const lettering = (text: string, gap: number): string => {
  const glyphs = [...text].map((letter) => letters[letter] ?? blank);
  const width = glyphs.reduce((sum, [, advance]) => sum + advance + gap, -gap);
  let x = -width / 2;
  return glyphs
    .map(([path, advance]) => {
      const at = x;
      x += advance + gap;
      return `<path transform="translate(${at} 0)" d="${path}"/>`;
    })
    .join('');
};

const wave = (y: number, half: number): string => {
  const step = half / 3;
  const humps = Array.from({ length: 5 }, () => `t${step} 0`).join('');
  return `M${-half} ${y}q${step / 2} -34 ${step} 0${humps}`;
};

/** Mark of the cider house: an otter that looks out of the water under a gate, and its name. See-through around. */
export const markSvg = `<svg xmlns="http://www.w3.org/2000/svg" width="1500" height="1300" viewBox="-750 -560 1500 1300">
  <mask id="face">
    <rect x="-400" y="-400" width="800" height="520" fill="#fff"/>
    <g fill="#000">
      <circle cx="-72" cy="-58" r="19"/><circle cx="72" cy="-58" r="19"/>
      <path d="M0 44C-30 44 -56 22 -50 0C-44 -18 -18 -14 0 -6C18 -14 44 -18 50 0C56 22 30 44 0 44Z"/>
    </g>
    <g fill="none" stroke="#000" stroke-width="10" stroke-linecap="round">
      <path d="M0 40V66M0 66C-14 90 -44 92 -62 76M0 66C14 90 44 92 62 76"/>
      <path d="M-104 20L-186 4M-106 44L-190 46M104 20L186 4M106 44L190 46"/>
    </g>
  </mask>
  <g mask="url(#face)" fill="${cream}">
    <circle cx="-158" cy="-142" r="44"/><circle cx="158" cy="-142" r="44"/>
    <path d="M-196 10C-214 -130 -122 -226 0 -226C122 -226 214 -130 196 10C188 110 110 150 0 150C-110 150 -188 110 -196 10Z"/>
  </g>
  <g fill="none" stroke-linecap="round">
    <path d="M-340 250V-150A340 340 0 0 1 340 -150V250" stroke="${cream}" stroke-width="36"/>
    <path d="M-284 118V-150A284 284 0 0 1 284 -150V118" stroke="${amber}" stroke-width="12"/>
    <path d="${wave(168, 270)}" stroke="${amber}" stroke-width="26"/>
    <path d="${wave(228, 230)}" stroke="${amber}" stroke-width="20"/>
  </g>
  <g fill="none" stroke="${cream}" stroke-width="26" stroke-linejoin="round" stroke-linecap="round" transform="translate(0 370) scale(1.22)">${lettering('OTTERGATE', 34)}</g>
  <g fill="none" stroke="${amber}" stroke-width="22" stroke-linejoin="round" stroke-linecap="round" transform="translate(0 588) scale(0.72)">${lettering('CIDER', 130)}</g>
</svg>`;

/** A number 0..1 that is the same each time. */
const chance = (n: number): number => (Math.abs(Math.sin(n * 127.1 + 11.7)) * 43758.5453) % 1;
const many = (count: number, draw: (i: number) => string): string =>
  Array.from({ length: count }, (_, i) => draw(i)).join('');
const picture = (inside: string): string =>
  `<svg xmlns="http://www.w3.org/2000/svg" width="1920" height="1080" viewBox="0 0 1920 1080">${inside}</svg>`;

/** A boathouse at dusk, its door open, over still water. */
export const boathouseSvg = (() => {
  const house = `<path d="M520 470L960 250L1400 470V760H520Z" fill="#0c1118"/>
    ${many(31, (i) => `<path d="M${534 + i * 28} ${480 - Math.max(0, 180 - Math.abs(960 - 534 - i * 28) * 0.5)}V760" stroke="#ffb45e" stroke-opacity="${0.05 + 0.12 * chance(i)}" stroke-width="2"/>`)}
    <path d="M480 486L960 240L1440 486" fill="none" stroke="#04060a" stroke-width="34"/>
    <path d="M800 760V590a160 160 0 0 1 320 0V760Z" fill="url(#door)"/>
    <path d="M960 430V760M800 620H1120" stroke="#3a1a0c" stroke-width="8"/>
    <g fill="#ffcf86"><rect x="600" y="560" width="84" height="96" rx="6"/><rect x="1236" y="560" width="84" height="96" rx="6"/></g>
    <path d="M642 560v96M600 608h84M1278 560v96M1236 608h84" stroke="#0c1118" stroke-width="7"/>`;
  const shine = many(30, (i) => {
    const y = 776 + i * 10;
    const width = (330 - i * 7) * (0.6 + 0.5 * chance(i));
    const x = 960 - width / 2 + 60 * (chance(i + 40) - 0.5) * (1 + i / 14);
    return `<rect x="${x}" y="${y}" width="${width}" height="4" rx="2" fill="#ffb45e" opacity="${0.75 - i * 0.023}"/>`;
  });
  const moonPath = many(34, (i) => {
    const width = (60 + i * 3) * (0.4 + 0.8 * chance(i + 90));
    return `<rect x="${1580 - width / 2 + 40 * (chance(i + 7) - 0.5)}" y="${770 + i * 9}" width="${width}" height="3" rx="1.5" fill="#cfe0ff" opacity="${0.5 - i * 0.013}"/>`;
  });
  return picture(`<defs>
    <linearGradient id="sky" x1="0" y1="0" x2="0" y2="1"><stop offset="0" stop-color="#040714"/><stop offset="0.55" stop-color="#231f4d"/><stop offset="0.85" stop-color="#8a3f5c"/><stop offset="1" stop-color="#e27a4a"/></linearGradient>
    <linearGradient id="water" x1="0" y1="0" x2="0" y2="1"><stop offset="0" stop-color="#5a2f4c"/><stop offset="0.35" stop-color="#141530"/><stop offset="1" stop-color="#02040a"/></linearGradient>
    <radialGradient id="door" cx="0.5" cy="0.7" r="0.8"><stop offset="0" stop-color="#ffe2a6"/><stop offset="0.6" stop-color="#f08a3c"/><stop offset="1" stop-color="#7a3012"/></radialGradient>
    <radialGradient id="glow"><stop offset="0" stop-color="#ffb45e" stop-opacity="0.55"/><stop offset="1" stop-color="#ffb45e" stop-opacity="0"/></radialGradient>
    <radialGradient id="halo"><stop offset="0" stop-color="#cfe0ff" stop-opacity="0.5"/><stop offset="1" stop-color="#cfe0ff" stop-opacity="0"/></radialGradient>
  </defs>
  <rect width="1920" height="764" fill="url(#sky)"/>
  ${many(110, (i) => `<circle cx="${1920 * chance(i)}" cy="${430 * chance(i + 200) ** 1.4}" r="${0.8 + 1.8 * chance(i + 400)}" fill="#fff6e2" opacity="${0.25 + 0.6 * chance(i + 600)}"/>`)}
  <circle cx="1580" cy="210" r="210" fill="url(#halo)"/><circle cx="1580" cy="210" r="54" fill="#fdf3df"/>
  <path d="M0 690L210 610 420 668 640 600 980 676 1240 604 1500 664 1730 612 1920 660V764H0Z" fill="#241a3a"/>
  <path d="M0 730L180 694 420 726 760 700 1120 730 1480 696 1920 724V764H0Z" fill="#0e0d1e"/>
  <rect y="760" width="1920" height="320" fill="url(#water)"/>
  <g transform="matrix(1 0 0 -0.62 0 1231)" opacity="0.4">${house}</g>
  <ellipse cx="960" cy="700" rx="620" ry="330" fill="url(#glow)"/>
  ${house}
  <path d="M300 768H1620V784H300Z" fill="#04060a"/>
  ${many(9, (i) => `<rect x="${330 + i * 156}" y="768" width="12" height="${60 + 30 * chance(i)}" fill="#04060a"/>`)}
  <path d="M150 812C200 850 420 850 480 808L450 868C400 888 230 888 190 868Z" fill="#030509"/>
  ${shine}${moonPath}`);
})();

/** Two oars crossed over rings on water. */
export const oarsSvg = (() => {
  const oar = (turn: number): string => `<g transform="translate(960 560) rotate(${turn})">
    <rect x="-13" y="-330" width="26" height="730" rx="13" fill="url(#wood)"/>
    <path d="M-70 -530C-70 -430 -48 -372 0 -320C48 -372 70 -430 70 -530C70 -566 -70 -566 -70 -530Z" fill="${amber}"/>
    <path d="M-70 -530C-70 -500 -68 -474 -64 -452H64C68 -474 70 -500 70 -530C70 -566 -70 -566 -70 -530Z" fill="#b8482e"/>
    <path d="M0 -540V-330" stroke="#7a3a14" stroke-width="5"/>
    <rect x="-19" y="150" width="38" height="60" rx="8" fill="#6b2f1c"/><rect x="-17" y="330" width="34" height="86" rx="16" fill="#1f9a8e"/></g>`;
  return picture(`<defs>
    <radialGradient id="deep" cx="0.5" cy="0.52" r="0.7"><stop offset="0" stop-color="#0d4f52"/><stop offset="1" stop-color="#010a0e"/></radialGradient>
    <linearGradient id="wood" x1="0" y1="0" x2="1" y2="0"><stop offset="0" stop-color="#a07a48"/><stop offset="0.4" stop-color="${cream}"/><stop offset="1" stop-color="#8a6236"/></linearGradient>
  </defs>
  <rect width="1920" height="1080" fill="url(#deep)"/>
  ${many(14, (i) => `<ellipse cx="960" cy="560" rx="${110 + i * 84 + 10 * chance(i)}" ry="${60 + i * 46}" fill="none" stroke="#8ff0de" stroke-width="${9 - i * 0.55}" opacity="${0.8 - i * 0.055}"/>`)}
  ${oar(40)}${oar(-40)}`);
})();

const apple = (
  x: number,
  y: number,
  size: number,
): string => `<g transform="translate(${x} ${y}) scale(${size})">
  <path d="M0 -62C4 -92 14 -108 30 -120" fill="none" stroke="#4a2c18" stroke-width="9" stroke-linecap="round"/>
  <path d="M0 -58C40 -92 104 -70 104 2C104 70 52 112 0 100C-52 112 -104 70 -104 2C-104 -70 -40 -92 0 -58Z" fill="url(#skin)"/>
  <path d="M-62 -34C-78 -10 -78 24 -64 48" fill="none" stroke="${cream}" stroke-opacity="0.7" stroke-width="12" stroke-linecap="round"/></g>`;
const leaf = (x: number, y: number, turn: number, size: number): string =>
  `<g transform="translate(${x} ${y}) rotate(${turn}) scale(${size})"><path d="M0 0C40 -56 130 -60 180 0C130 60 40 56 0 0Z" fill="url(#leaf)"/><path d="M0 0H164" stroke="#0a2a1c" stroke-width="5"/></g>`;

/** A bough with ripe apples before the lights of the other bank. */
export const boughSvg = picture(`<defs>
    <linearGradient id="dusk" x1="0" y1="0" x2="0" y2="1"><stop offset="0" stop-color="#02060c"/><stop offset="1" stop-color="#0a3038"/></linearGradient>
    <radialGradient id="skin" cx="0.36" cy="0.3" r="0.85"><stop offset="0" stop-color="#ffd27a"/><stop offset="0.4" stop-color="#e0662c"/><stop offset="1" stop-color="#4a1010"/></radialGradient>
    <linearGradient id="leaf" x1="0" y1="0" x2="1" y2="1"><stop offset="0" stop-color="#5fae62"/><stop offset="1" stop-color="#123f2c"/></linearGradient>
    <radialGradient id="far"><stop offset="0" stop-color="#ffc46e" stop-opacity="0.5"/><stop offset="0.8" stop-color="#ff9a4a" stop-opacity="0.3"/><stop offset="1" stop-color="#ff9a4a" stop-opacity="0"/></radialGradient>
  </defs>
  <rect width="1920" height="1080" fill="url(#dusk)"/>
  ${many(38, (i) => `<circle cx="${1920 * chance(i + 3)}" cy="${620 + 420 * chance(i + 70) ** 1.5}" r="${18 + 60 * chance(i + 130)}" fill="url(#far)" opacity="${0.3 + 0.5 * chance(i + 9)}"/>`)}
  <path d="M-40 210C300 150 560 330 900 300C1240 270 1500 150 1960 250" fill="none" stroke="#2c1a10" stroke-width="46" stroke-linecap="round"/>
  <path d="M-40 200C300 140 560 320 900 290C1240 260 1500 140 1960 240" fill="none" stroke="#6b4426" stroke-width="12" stroke-linecap="round"/>
  ${many(26, (i) => leaf(20 + i * 74, 210 + 70 * Math.sin(i * 0.42) + 30 * chance(i), -70 + 300 * chance(i + 21), 0.62 + 0.5 * chance(i + 55)))}
  ${apple(330, 400, 1.15)}${apple(640, 450, 1.35)}${apple(1010, 460, 1.1)}${apple(1290, 440, 1.4)}${apple(1640, 380, 1.1)}
  ${many(9, (i) => leaf(180 + i * 205, 262 + 40 * chance(i + 77), 20 + 130 * chance(i + 31), 0.8))}`);
