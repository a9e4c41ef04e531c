/** A file that cannot be used, with a sentence that a VJ understands. */
export class MediaFault extends Error {
  override readonly name = 'MediaFault';
}

/** Whether ffmpeg met the end of a file before the end of its picture. */
export const endsEarly = (complaint: string): boolean => /partial file|ended prematurely/i.test(complaint);

/** What the complaints of ffmpeg mean, first match first. */
const meanings: [RegExp, string][] = [
  [
    /moov atom not found|End of file|truncated|partial file|ended prematurely/i,
    'This file ends in the middle: upload it again.',
  ],
  [
    /Format not on whitelist|not on whitelist/i,
    'This kind of file is not taken: export it as MP4, MOV or WebM.',
  ],
  [/Invalid data found/i, 'This file is damaged or no video: upload it again.'],
  [
    /max_pixels|picture size .* invalid|exceeds the limit/i,
    'This picture is too large: 4096 × 2160 is the most for video.',
  ],
  [/Decoder .* not found|Unknown decoder|no decoder/i, 'This codec cannot be read here: export it as H.264.'],
  [/No space left/i, 'The disk is full: free some space and try again.'],
];

/** One sentence for what ffmpeg or ffprobe said. */
export const faultOf = (complaint: string): MediaFault =>
  new MediaFault(
    meanings.find(([pattern]) => pattern.test(complaint))?.[1] ??
      'This file cannot be read: export it anew as MP4.',
  );
