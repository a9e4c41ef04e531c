import { endsEarly, faultOf, MediaFault } from './mediaFault';
import { probe, type VideoFacts } from './probe';
import { run } from './run';
import { posterArgs, secondsDone, transcodeArgs } from './transcodeArgs';

/** A clip may take this many times its length, and ten minutes more, ms. */
const limitOf = (facts: VideoFacts): number => facts.durationS * 1000 * 60 + 600_000;

/** A cut that is shorter than this is no loss worth a refusal, s. */
const shortByS = 0.5;

/**
 * Makes the served file of a clip. Throws a MediaFault with a plain sentence; an AbortError's reason when asked to end.
 * @param onProgress share of the work done, 0..1
 * @returns facts of the made file
 */
export async function transcode(
  from: string,
  to: string,
  options: { threads: number; signal: AbortSignal; onProgress: (share: number) => void },
): Promise<VideoFacts> {
  const facts = await probe(from);
  const args = transcodeArgs(from, to, facts, options.threads);
  const { code, stderr, ended } = await run('ffmpeg', args, {
    limitMs: limitOf(facts),
    signal: options.signal,
    onLine: (line) => {
      const done = secondsDone(line);
      if (done !== null) options.onProgress(Math.min(1, done / facts.durationS));
    },
  });
  options.signal.throwIfAborted();
  if (ended === 'time')
    throw new MediaFault('This video takes too long to convert: cut it or make it smaller.');
  if (code !== 0) throw faultOf(stderr);
  const made = await probe(to);
  // ffmpeg takes a file that was cut off for a shorter one and is content.
  if (endsEarly(stderr) && made.durationS < facts.durationS - shortByS) throw faultOf('truncated');
  return made;
}

/** One frame of a clip as PNG. */
export async function clipPoster(
  from: string,
  to: string,
  facts: VideoFacts,
  signal: AbortSignal,
): Promise<void> {
  const { code, stderr } = await run('ffmpeg', posterArgs(from, to, facts), { limitMs: 30_000, signal });
  signal.throwIfAborted();
  if (code !== 0) throw faultOf(stderr);
}
