import type { Draft } from './useSceneEditor';

/** What a draft lacks before it can be saved, in a sentence; null when it lacks nothing. Names only: all else is held by its field. */
export const lackOf = ({ name, body }: Draft): string | null => {
  if (!name.trim()) return 'The scene needs a name before it can be saved.';
  if (body.layers.some((layer) => !layer.name)) return 'A layer needs a name before the scene can be saved.';
  if (body.dials.some((dial) => !dial.name)) return 'A dial needs a name before the scene can be saved.';
  return null;
};
