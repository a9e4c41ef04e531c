/** The shipped fonts, as CSS names them. */
export const fontFamily = (mono: boolean): string =>
  mono ? '"Atkinson Hyperlegible Mono", monospace' : '"Atkinson Hyperlegible Next", sans-serif';

const asked = new Map<string, boolean>();

/**
 * Whether a font can be drawn with. Asks for it the first time; what was drawn before it came is drawn again, in
 * another font, when the answer changes.
 */
export const fontReady = (weight: number, mono: boolean, text: string): boolean => {
  const font = `${weight} 100px ${fontFamily(mono)}`;
  const known = asked.get(font);
  if (known !== undefined) return known;
  const there = document.fonts.check(font, text);
  asked.set(font, there);
  const done = (): void => {
    asked.set(font, true);
  };
  if (!there) document.fonts.load(font, text).then(done, done);
  return there;
};
