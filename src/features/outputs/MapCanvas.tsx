import { type KeyboardEvent, type PointerEvent, useRef } from 'react';
import type { OutputMap, PixelPoint, Region } from '#shared/mapping/schema';
import { RegionShape } from './RegionShape';

export interface Choice {
  regionId: string;
  /** Corner 0..3, or null for the whole region. */
  corner: number | null;
}

interface Props {
  map: OutputMap;
  choice: Choice | null;
  onChoose: (choice: Choice | null) => void;
  /** A drag to this point, raster pixels; `grip` names the drag. */
  onDragCorner: (regionId: string, corner: number, to: PixelPoint, grip: string) => void;
  onDragRegion: (regionId: string, dx: number, dy: number, grip: string) => void;
  onNudge: (dx: number, dy: number) => void;
}

/** Room around the raster, as a share of it, so that corners outside can be reached. */
const margin = 0.12;

/** Pixels by arrow key: plain, with Shift, with Alt. */
const arrows: Record<string, PixelPoint> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/** Raster point under a pointer, in pixels. */
const rasterPoint = (svg: SVGSVGElement, event: PointerEvent): PixelPoint => {
  const matrix = svg.getScreenCTM();
  if (!matrix) return [0, 0];
  const point = new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse());
  return [point.x, point.y];
};

interface Drag {
  regionId: string;
  corner: number | null;
  /** Pointer minus corner at the start, so that the corner does not jump to the finger. */
  offset: PixelPoint;
  last: PixelPoint;
  grip: string;
}

/** What a display puts out, with every region's corners under mouse, finger and keys. */
export const MapCanvas = ({ map, choice, onChoose, onDragCorner, onDragRegion, onNudge }: Props) => {
  const svg = useRef<SVGSVGElement>(null);
  const drag = useRef<Drag | null>(null);
  const [width, height] = map.raster;
  const unit = Math.max(width, height) / 1000;

  const start = (event: PointerEvent, region: Region, corner: number | null) => {
    if (!svg.current) return;
    event.stopPropagation();
    svg.current.setPointerCapture(event.pointerId);
    svg.current.focus();
    const at = rasterPoint(svg.current, event);
    const held = corner === null ? at : (region.corners[corner] ?? at);
    drag.current = {
      regionId: region.id,
      corner,
      offset: [at[0] - held[0], at[1] - held[1]],
      last: at,
      grip: `drag ${event.timeStamp}`,
    };
    onChoose({ regionId: region.id, corner });
  };
  const move = (event: PointerEvent) => {
    const held = drag.current;
    if (!held || !svg.current) return;
    const [x, y] = rasterPoint(svg.current, event);
    if (held.corner === null) onDragRegion(held.regionId, x - held.last[0], y - held.last[1], held.grip);
    else onDragCorner(held.regionId, held.corner, [x - held.offset[0], y - held.offset[1]], held.grip);
    held.last = [x, y];
  };
  const end = () => {
    drag.current = null;
  };
  const keys = (event: KeyboardEvent) => {
    const step = arrows[event.key];
    if (!step) return;
    event.preventDefault();
    const size = event.shiftKey ? 10 : event.altKey ? 0.1 : 1;
    onNudge(step[0] * size, step[1] * size);
  };

  return (
    <svg
      ref={svg}
      role="application"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: the picture takes arrow keys, as a slider does
      tabIndex={0}
      aria-label="Output map. Choose a corner, then move it with the arrow keys."
      viewBox={`${-width * margin} ${-height * margin} ${width * (1 + 2 * margin)} ${height * (1 + 2 * margin)}`}
      className="h-full w-full touch-none select-none bg-black outline-none focus-visible:ring-2 focus-visible:ring-(--moonlight)"
      onPointerMove={move}
      onPointerUp={end}
      onPointerCancel={end}
      onPointerDown={() => onChoose(null)}
      onKeyDown={keys}
    >
      <rect width={width} height={height} fill="#050807" stroke="var(--line)" strokeWidth={1.5 * unit} />
      {map.regions.map((region) => (
        <RegionShape
          key={region.id}
          region={region}
          unit={unit}
          chosen={choice?.regionId === region.id}
          corner={choice?.regionId === region.id ? choice.corner : null}
          onGrab={start}
        />
      ))}
    </svg>
  );
};
