import type { Asset } from '#shared/api/assets';
import type { ManifestAsset } from '#shared/protocol/messages';

/** Files that can be drawn, as displays get them. */
export const drawable = (assets: readonly Asset[]): ManifestAsset[] =>
  assets.flatMap(({ id, kind, url, bytes, width, height, durationS, fps }) =>
    url && width && height ? [{ id, kind, url, bytes, width, height, durationS, fps }] : [],
  );
