import type { Layer, SceneBody } from '#shared/scene/schema';

/** Most layers a scene holds, and most dials (see sceneBodySchema). */
export const most = { layers: 8, dials: 4 } as const;

/** The body with one layer changed. */
export const editLayer = (body: SceneBody, id: string, make: (layer: Layer) => Layer): SceneBody => ({
  ...body,
  layers: body.layers.map((layer) => (layer.id === id ? make(layer) : layer)),
});

/** The body with a layer moved to a place counted from the back; the same when it stays. */
export const moveLayer = (body: SceneBody, id: string, to: number): SceneBody => {
  const from = body.layers.findIndex((layer) => layer.id === id);
  const layer = body.layers[from];
  const place = Math.min(body.layers.length - 1, Math.max(0, to));
  if (!layer || place === from) return body;
  const layers = body.layers.filter((one) => one.id !== id);
  layers.splice(place, 0, layer);
  return { ...body, layers };
};

/** The body without a dial: layers on it let go, those on later dials follow theirs. */
export const removeDial = (body: SceneBody, index: number): SceneBody => ({
  ...body,
  dials: body.dials.filter((_dial, at) => at !== index),
  layers: body.layers.map((layer) => {
    if (layer.dial === null || layer.dial < index) return layer;
    return { ...layer, dial: layer.dial === index ? null : layer.dial - 1 };
  }),
});
