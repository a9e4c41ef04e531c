import type { SceneBody, Source } from './schema';

/** Ids of the Library's files that a layer's source uses, in its order. */
export const filesOfSource = (source: Source): readonly string[] => {
  if (source.kind === 'stills') return source.assetIds;
  if (source.kind === 'clip' || source.kind === 'mark') return source.assetId ? [source.assetId] : [];
  return [];
};

/** Ids of the files that a scene uses, each once. */
export const assetsOfBody = (body: SceneBody): string[] => [
  ...new Set(body.layers.flatMap((layer) => filesOfSource(layer.source))),
];
