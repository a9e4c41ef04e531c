import type { CSSProperties, ReactNode } from 'react';
import type { ManifestAsset } from '#shared/protocol/messages';
import type { DrawingName, Layer, Scene, SourceKind } from '#shared/scene/schema';

type Palette = readonly string[];
const at = (palette: Palette, i: number): string => palette[i] ?? '#9db0a8';

/** A still likeness of each drawing in its own four colours. The wall shows the drawing itself; this only names it. */
const likeness: Record<DrawingName, (palette: Palette) => CSSProperties['backgroundImage']> = {
  meadow: (p) =>
    `radial-gradient(circle at 28% 48%, ${at(p, 2)} 0 6%, transparent 9%), radial-gradient(circle at 62% 34%, ${at(p, 3)} 0 4%, transparent 7%), radial-gradient(circle at 78% 62%, ${at(p, 2)} 0 5%, transparent 8%), linear-gradient(${at(p, 0)} 45%, ${at(p, 1)})`,
  searchlights: (p) =>
    `repeating-conic-gradient(from -70deg at 50% 105%, ${at(p, 1)} 0 9deg, ${at(p, 0)} 9deg 20deg)`,
  awning: (p) =>
    `repeating-linear-gradient(115deg, ${at(p, 0)} 0 12%, ${at(p, 1)} 12% 20%, ${at(p, 2)} 20% 32%)`,
  ripple: (p) => `repeating-radial-gradient(circle at 40% 45%, ${at(p, 0)} 0 9%, ${at(p, 2)} 10% 12%)`,
  slats: (p) => `repeating-linear-gradient(${at(p, 0)} 0 14%, ${at(p, 2)} 14% 26%)`,
  tide: (p) =>
    `radial-gradient(120% 60% at 30% 110%, ${at(p, 2)}, transparent 70%), radial-gradient(110% 70% at 80% 100%, ${at(p, 1)}, transparent 75%), linear-gradient(${at(p, 0)}, ${at(p, 0)})`,
  lanterns: (p) =>
    `radial-gradient(circle at 25% 40%, ${at(p, 2)}, transparent 22%), radial-gradient(circle at 55% 60%, ${at(p, 3)}, transparent 20%), radial-gradient(circle at 82% 35%, ${at(p, 1)}, transparent 24%), linear-gradient(${at(p, 0)}, ${at(p, 0)})`,
  weave: (p) =>
    `repeating-linear-gradient(45deg, ${at(p, 1)} 0 6%, transparent 6% 14%), repeating-linear-gradient(-45deg, ${at(p, 2)} 0 6%, ${at(p, 0)} 6% 14%)`,
};

const Picture = ({ url }: { url: string | undefined }) =>
  url ? <img src={url} alt="" draggable={false} className="size-full object-contain" /> : null;

type Assets = ReadonlyMap<string, ManifestAsset>;
type Drawers = {
  [K in SourceKind]: (source: Extract<Layer['source'], { kind: K }>, assets: Assets) => ReactNode;
};

const drawers: Drawers = {
  clip: ({ assetId }, assets) => {
    const asset = assetId ? assets.get(assetId) : undefined;
    // The first frame only: metadata is a few kB, the clip itself is never fetched by a phone.
    return asset ? (
      <video
        src={`${asset.url}#t=0.5`}
        preload="metadata"
        muted
        playsInline
        className="size-full object-cover"
      />
    ) : null;
  },
  stills: ({ assetIds }, assets) => <Picture url={assets.get(assetIds[0] ?? '')?.url} />,
  mark: ({ assetId }, assets) => <Picture url={assets.get(assetId ?? '')?.url} />,
  words: ({ text, weight, colour }) => (
    <span
      className="flex size-full items-center justify-center overflow-hidden px-2 text-center text-[18px] leading-5"
      style={{ color: colour, fontWeight: weight }}
    >
      {text}
    </span>
  ),
  drawing: ({ drawing, palette }) => (
    <span className="block size-full" style={{ backgroundImage: likeness[drawing](palette) }} />
  ),
};

const blendOf = (blend: Layer['blend']): CSSProperties['mixBlendMode'] =>
  blend === 'add' ? 'plus-lighter' : blend;

const SketchLayer = ({ layer, assets }: { layer: Layer; assets: Assets }) => {
  const draw = drawers[layer.source.kind] as (source: Layer['source'], assets: Assets) => ReactNode;
  const { x, y, scale, turn } = layer.place;
  return (
    <span
      className="absolute inset-0"
      style={{
        opacity: layer.opacity,
        mixBlendMode: blendOf(layer.blend),
        transform: `translate(${x * 100}%, ${y * 100}%) scale(${scale}) rotate(${turn}deg)`,
      }}
    >
      {draw(layer.source, assets)}
    </span>
  );
};

/**
 * A still sketch of a scene from what it is made of, for scenes that no display has drawn tonight. Light and quick;
 * true pictures take its place as soon as there are any.
 */
export const SceneSketch = ({ scene, assets }: { scene: Scene; assets: Assets }) => (
  <span className="absolute inset-0 isolate overflow-hidden" style={{ background: scene.body.ground }}>
    {scene.body.layers
      .filter((layer) => layer.on)
      .map((layer) => (
        <SketchLayer key={layer.id} layer={layer} assets={assets} />
      ))}
  </span>
);
