import { z } from 'zod';
import { uploadLimits } from '#shared/api/assets';
import { faultOf, MediaFault } from './mediaFault';
import { run } from './run';

/** Facts of a video as it is seen: turned upright, in square pixels. */
export interface VideoFacts {
  width: number;
  height: number;
  durationS: number;
  fps: number;
  codec: string;
  /** Bright-range transfer (PQ or HLG) that must be mapped down. */
  hdr: boolean;
}

/** Demuxers that may be opened; no playlist, no network, no script of files. */
export const formatWhitelist =
  'mov,mp4,matroska,webm,avi,mpegts,mpeg,mpegvideo,gif,image2,flv,asf,ogg,mxf,dv,m4v,3gp';

/** Guards before each input: only local files, only known formats, bounded pictures. */
export const inputGuards = (path: string): string[] => [
  '-protocol_whitelist',
  'file,pipe',
  '-format_whitelist',
  formatWhitelist,
  '-max_pixels',
  String(uploadLimits.videoPixels),
  '-i',
  `file:${path}`,
];

const answerSchema = z.object({
  format: z.object({ duration: z.coerce.number().optional() }).optional(),
  streams: z.array(
    z.object({
      codec_type: z.string().optional(),
      codec_name: z.string().default('unknown'),
      width: z.number().default(0),
      height: z.number().default(0),
      duration: z.coerce.number().optional(),
      avg_frame_rate: z.string().default('0/0'),
      r_frame_rate: z.string().default('0/0'),
      sample_aspect_ratio: z.string().default('1:1'),
      color_transfer: z.string().optional(),
      side_data_list: z.array(z.object({ rotation: z.coerce.number().optional() })).default([]),
      tags: z.object({ rotate: z.coerce.number().optional() }).default({}),
    }),
  ),
});

const rate = (text: string): number => {
  const [over = 0, under = 0] = text.split(/[/:]/).map(Number);
  return under > 0 ? over / under : 0;
};

const probeLimitMs = 20_000;

/** What ffprobe says of a video. Throws a MediaFault with a plain sentence. */
export const factsOf = (json: string): VideoFacts => {
  const parsed = answerSchema.safeParse(JSON.parse(json || '{}'));
  const stream = parsed.data?.streams.find((one) => one.codec_type === 'video');
  if (!stream || stream.width < 2 || stream.height < 2)
    throw new MediaFault('There is no picture in this file.');
  const durationS = stream.duration ?? parsed.data?.format?.duration ?? 0;
  if (!(durationS > 0)) throw new MediaFault('This file has no length: export it anew as MP4.');
  if (durationS > uploadLimits.seconds)
    throw new MediaFault('This video is longer than 30 minutes: cut it first.');
  const turn =
    stream.side_data_list.find((side) => side.rotation !== undefined)?.rotation ?? stream.tags.rotate ?? 0;
  const lying = Math.abs(turn) % 180 === 90;
  const wide = Math.round(stream.width * (rate(stream.sample_aspect_ratio) || 1));
  return {
    width: lying ? stream.height : wide,
    height: lying ? wide : stream.height,
    durationS,
    fps: rate(stream.avg_frame_rate) || rate(stream.r_frame_rate) || 25,
    codec: stream.codec_name,
    hdr: ['smpte2084', 'arib-std-b67'].includes(stream.color_transfer ?? ''),
  };
};

/** Probes a video file. Throws a MediaFault with a plain sentence. */
export const probe = async (path: string): Promise<VideoFacts> => {
  const args = [
    '-v',
    'error',
    '-print_format',
    'json',
    '-show_format',
    '-show_streams',
    ...inputGuards(path),
  ];
  const { code, stdout, stderr, ended } = await run('ffprobe', args, { limitMs: probeLimitMs });
  if (ended === 'time') throw new MediaFault('This file takes too long to read: export it anew as MP4.');
  if (code !== 0) throw faultOf(stderr);
  return factsOf(stdout);
};
