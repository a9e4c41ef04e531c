/** Distance of lines as a share of their size. */
export const lineHeight = 1.12;
/** Size words are measured at before their true size is known, pixels. */
export const trial = 100;

/** Breaks one line of words into `count` lines of about the same width. */
const broken = (text: string, count: number, width: (text: string) => number): string[] => {
  const words = text.split(/\s+/).filter(Boolean);
  const goal = width(text) / count;
  const lines: string[] = [];
  let line = '';
  for (const word of words) {
    const longer = line ? `${line} ${word}` : word;
    const over = width(longer) - goal;
    const tooLong = line !== '' && lines.length < count - 1 && over > 0 && over > goal - width(line);
    if (tooLong) lines.push(line);
    line = tooLong ? word : longer;
  }
  return line ? [...lines, line] : lines;
};

/** The lines that let the words stand largest in a box of this shape. Line breaks of the writer stay. */
export const linesFor = (text: string, aspect: number, width: (text: string) => number): string[] => {
  const given = text.split('\n').map((line) => line.trim());
  const size = (lines: string[]): number => {
    const widest = Math.max(1e-6, ...lines.map(width));
    return Math.min(aspect / widest, 1 / (lines.length * lineHeight * trial));
  };
  if (given.length > 1) return given;
  let best = given;
  for (let count = 2; count <= 6; count += 1) {
    const lines = broken(given[0] ?? '', count, width);
    if (size(lines) > size(best)) best = lines;
  }
  return best;
};
