import { useEffect, useMemo, useRef, useState } from 'react';
import {
  eyeAt,
  roomBox,
  roomLines,
  type Viewpoint,
  viewMap,
  viewpoints,
  withUnseen,
} from '#shared/venue/roomView';
import type { Screen } from '#shared/venue/schema';
import { Segmented } from '@/components/Segmented';
import type { ShowLink } from '@/link/types';
import { startRoom } from './roomLoop';

interface Props {
  link: ShowLink;
  screens: readonly Screen[];
}

/** Pixels that the room is drawn in. */
const raster = [960, 540] as const;
const viewNames: Record<Viewpoint, string> = {
  floor: 'From the floor',
  left: 'From house left',
  right: 'From house right',
};

/** The venue's screens in a simple room, drawn by the renderer that displays use. */
export const RehearsalRoom = ({ link, screens }: Props) => {
  const canvas = useRef<HTMLCanvasElement>(null);
  const [viewpoint, setViewpoint] = useState<Viewpoint>('floor');
  const [fault, setFault] = useState<string | null>(null);
  const { map, lines } = useMemo(() => {
    const box = roomBox(screens);
    const eye = eyeAt(viewpoint, box, raster);
    return { map: withUnseen(viewMap(screens, eye), screens), lines: roomLines(box, eye) };
  }, [screens, viewpoint]);
  const newest = useRef(map);
  newest.current = map;
  useEffect(() => {
    if (!canvas.current) return;
    try {
      return startRoom(canvas.current, link, () => newest.current);
    } catch {
      setFault('This browser cannot draw the room: it has no WebGL2.');
    }
  }, [link]);
  return (
    <div className="flex min-w-0 flex-col gap-3">
      <div className="relative aspect-video w-full overflow-hidden rounded-xl bg-black">
        <canvas
          ref={canvas}
          width={raster[0]}
          height={raster[1]}
          className="absolute inset-0 h-full w-full"
          aria-label="The room with its screens"
        />
        <svg
          viewBox={`0 0 ${raster[0]} ${raster[1]}`}
          className="pointer-events-none absolute inset-0 h-full w-full"
          aria-hidden="true"
        >
          <path
            d={lines.map(([from, to]) => `M${from.join(' ')}L${to.join(' ')}`).join('')}
            stroke="var(--line)"
            strokeWidth={1.2}
            fill="none"
          />
          {map.regions.map((region) => (
            <polygon
              key={region.id}
              points={region.corners.map((point) => point.join(',')).join(' ')}
              fill="none"
              stroke="#2a373380"
            />
          ))}
        </svg>
        {fault && (
          <p role="alert" className="absolute inset-0 grid place-items-center p-6 text-(--amber)">
            {fault}
          </p>
        )}
      </div>
      <Segmented
        label="Watch"
        options={viewpoints.map((one) => ({ value: one, label: viewNames[one] }))}
        value={viewpoint}
        onChange={(value) => setViewpoint(value as Viewpoint)}
      />
    </div>
  );
};
