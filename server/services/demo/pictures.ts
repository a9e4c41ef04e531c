/** Pictures of the demo night as SVG, drawn by us. No text in them: a bare Debian has no fonts. */

/** Mark of the cider house: a drop in a ring over two waves, white on nothing. */
export const markSvg = `<svg xmlns="http://www.w3.org/2000/svg" width="1024" height="1024" viewBox="-512 -512 1024 1024">
  <g fill="none" stroke="#ffffff">
    <circle r="470" stroke-width="34"/>
    <circle r="404" stroke-width="8"/>
    <path d="M-330 150 C-240 90 -180 90 -90 150 S70 210 160 150 270 100 330 140" stroke-width="34" stroke-linecap="round"/>
    <path d="M-262 246 C-190 200 -130 200 -60 246 S80 292 150 246 220 214 262 236" stroke-width="26" stroke-linecap="round"/>
  </g>
  <path d="M0 -330 C92 -196 150 -116 150 -22 A150 150 0 0 1 -150 -22 C-150 -116 -92 -196 0 -330 Z" fill="#ffffff"/>
  <path d="M-74 -34 A74 74 0 0 0 0 44" fill="none" stroke="#000000" stroke-width="20" stroke-linecap="round"/>
</svg>`;

/** A boathouse at dusk over still water. */
export const boathouseSvg = (() => {
  const planks = Array.from(
    { length: 22 },
    (_, i) => `<path d="M${330 + i * 28} 420 V640" stroke="#0a1014" stroke-width="3"/>`,
  );
  const shine = Array.from({ length: 15 }, (_, i) => {
    const width = 330 - i * 17 + ((i * 53) % 40);
    const x = 640 - width / 2 + (((i * 37) % 30) - 15);
    return `<rect x="${x}" y="${664 + i * 16}" width="${width}" height="${5 - i * 0.2}" rx="2" fill="#ffb45e" opacity="${0.5 - i * 0.03}"/>`;
  });
  return `<svg xmlns="http://www.w3.org/2000/svg" width="1280" height="920" viewBox="0 0 1280 920">
  <defs>
    <linearGradient id="sky" x1="0" y1="0" x2="0" y2="1"><stop offset="0" stop-color="#070b1c"/><stop offset="0.6" stop-color="#2a2350"/><stop offset="1" stop-color="#c8613f"/></linearGradient>
    <linearGradient id="water" x1="0" y1="0" x2="0" y2="1"><stop offset="0" stop-color="#43254a"/><stop offset="1" stop-color="#04060e"/></linearGradient>
    <radialGradient id="door"><stop offset="0" stop-color="#ffd48a"/><stop offset="1" stop-color="#c9622f"/></radialGradient>
  </defs>
  <rect width="1280" height="650" fill="url(#sky)"/>
  <path d="M0 600 L180 560 320 590 520 548 760 586 980 556 1280 596 V650 H0 Z" fill="#120f22"/>
  <rect y="648" width="1280" height="272" fill="url(#water)"/>
  <path d="M300 430 L640 250 980 430 V648 H300 Z" fill="#10161c"/>
  ${planks.join('')}
  <path d="M270 442 L640 240 1010 442" fill="none" stroke="#05070a" stroke-width="26"/>
  <path d="M520 648 V500 a120 120 0 0 1 240 0 V648 Z" fill="url(#door)"/>
  <circle cx="640" cy="352" r="30" fill="#ffd48a"/>
  ${shine.join('')}
</svg>`;
})();

/** Two oars crossed over rings on water. */
export const oarsSvg = (() => {
  const rings = Array.from(
    { length: 9 },
    (_, i) =>
      `<ellipse cx="640" cy="460" rx="${90 + i * 74}" ry="${52 + i * 44}" fill="none" stroke="#7fe0d0" stroke-width="${7 - i * 0.6}" opacity="${0.75 - i * 0.075}"/>`,
  );
  const oar = (turn: number) =>
    `<g transform="translate(640 460) rotate(${turn})"><rect x="-11" y="-330" width="22" height="620" rx="11" fill="#f3e6cf"/><path d="M-58 -500 C-58 -400 -40 -350 0 -320 C40 -350 58 -400 58 -500 C58 -530 -58 -530 -58 -500 Z" fill="#e58a3c"/><rect x="-16" y="250" width="32" height="70" rx="14" fill="#1f9a8e"/></g>`;
  return `<svg xmlns="http://www.w3.org/2000/svg" width="1280" height="920" viewBox="0 0 1280 920">
  <rect width="1280" height="920" fill="#031a1e"/>
  ${rings.join('')}
  ${oar(38)}${oar(-38)}
</svg>`;
})();

/** A bottle with a lamp behind it. */
export const bottleSvg = (() => {
  const bubbles = Array.from({ length: 34 }, (_, i) => {
    const x = 552 + ((i * 61) % 176);
    const y = 330 + ((i * 97) % 470);
    return `<circle cx="${x}" cy="${y}" r="${3 + ((i * 7) % 8)}" fill="#ffe9b8" opacity="${0.25 + ((i * 13) % 40) / 100}"/>`;
  });
  return `<svg xmlns="http://www.w3.org/2000/svg" width="1280" height="920" viewBox="0 0 1280 920">
  <defs>
    <radialGradient id="lamp" cx="0.5" cy="0.55" r="0.6"><stop offset="0" stop-color="#ffb02e" stop-opacity="0.95"/><stop offset="0.5" stop-color="#8a3d0e" stop-opacity="0.6"/><stop offset="1" stop-color="#120702" stop-opacity="0"/></radialGradient>
    <linearGradient id="glass" x1="0" y1="0" x2="1" y2="0"><stop offset="0" stop-color="#5a2406"/><stop offset="0.3" stop-color="#e0841d"/><stop offset="0.55" stop-color="#ffd27a"/><stop offset="0.8" stop-color="#c26414"/><stop offset="1" stop-color="#3a1603"/></linearGradient>
  </defs>
  <rect width="1280" height="920" fill="#0b0502"/>
  <rect width="1280" height="920" fill="url(#lamp)"/>
  <path d="M600 60 h80 v150 c0 60 60 90 60 170 v450 q0 40 -40 40 h-120 q-40 0 -40 -40 v-450 c0 -80 60 -110 60 -170 Z" fill="url(#glass)"/>
  ${bubbles.join('')}
  <rect x="592" y="44" width="96" height="44" rx="10" fill="#f4efe2"/>
  <circle cx="640" cy="600" r="84" fill="#f4efe2"/>
  <path d="M640 540 c26 38 42 58 42 84 a42 42 0 0 1 -84 0 c0 -26 16 -46 42 -84 Z" fill="#1c4a3c"/>
</svg>`;
})();
