import { memo, useRef } from 'react';
import type { ManifestAsset } from '#shared/protocol/messages';
import type { Scene } from '#shared/scene/schema';
import { StateBadge } from './marks';
import { SceneSketch } from './SceneSketch';
import type { TileState } from './tileState';
import { type Badge, badges } from './tileWords';

interface Props {
  scene: Scene;
  tile: TileState;
  /** base64 WebP from tonight's wall; null shows a sketch. */
  seen: string | null;
  assets: ReadonlyMap<string, ManifestAsset>;
  asking: boolean;
  /** Looks unready: no link, or not this role's. It still answers a tap with the reason. */
  unready: boolean;
  /** Key that fires it, printed on the tile. */
  digit?: string | null;
  onPress: () => void;
}

const frames: Record<Badge['kind'] | 'none', string> = {
  none: 'outline-transparent',
  asking: 'outline-(--quiet) outline-dotted',
  sent: 'outline-(--moonlight) outline-dashed',
  landing: 'outline-(--moonlight)',
  on: 'outline-(--firefly)',
  look: 'outline-(--amber)',
};

const Face = memo(({ scene, seen, assets }: Pick<Props, 'scene' | 'seen' | 'assets'>) =>
  seen ? (
    <img
      src={`data:image/webp;base64,${seen}`}
      alt=""
      draggable={false}
      className="absolute inset-0 size-full object-cover"
    />
  ) : (
    <SceneSketch scene={scene} assets={assets} />
  ),
);
Face.displayName = 'Face';

/** Longest wait in beats that this tile has seen since it was sent, so that its ring starts empty. */
const useWaitBeats = (beatsLeft: number | null): number => {
  const longest = useRef(0);
  longest.current = beatsLeft === null ? 0 : Math.max(longest.current, beatsLeft);
  return longest.current;
};

/** A scene to fire. Says nothing, asked, sent with the beats left, landing, on the wall, or look here. */
export const SceneTile = ({ scene, tile, seen, assets, asking, unready, digit, onPress }: Props) => {
  const wait = useWaitBeats(tile.sent?.beatsLeft ?? null);
  const list = badges(tile, asking, wait);
  const kind = list[0]?.kind ?? 'none';
  return (
    <button
      type="button"
      onClick={onPress}
      data-scene={scene.id}
      data-state={kind}
      aria-disabled={unready || undefined}
      aria-label={[scene.name, ...list.map(({ words }) => words)].join(', ')}
      className={`relative flex h-full min-h-24 flex-col overflow-hidden rounded-2xl bg-(--raised) text-left -outline-offset-2 outline-[3px] transition-transform duration-75 focus-visible:outline-4 focus-visible:outline-white active:scale-[0.97] ${frames[kind]}`}
    >
      <span className={`relative block min-h-0 flex-1 bg-black ${unready ? 'opacity-40 grayscale' : ''}`}>
        <Face scene={scene} seen={seen} assets={assets} />
      </span>
      <span className="absolute top-1.5 left-1.5 flex flex-col gap-1">
        {list.map((badge) => (
          <StateBadge key={badge.kind} badge={badge} />
        ))}
      </span>
      <span className="flex items-center justify-between gap-1 px-2.5 py-1.5 text-[18px] leading-6">
        <span className={`truncate font-semibold ${unready ? 'text-(--quiet)' : ''}`}>{scene.name}</span>
        {digit ? (
          <kbd className="rounded-md border border-(--line) px-1.5 font-mono text-(--quiet) text-[15px]">
            {digit}
          </kbd>
        ) : null}
      </span>
    </button>
  );
};
