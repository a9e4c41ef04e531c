import type { PointerEvent } from 'react';
import { applyHomography, homographyTo } from '#shared/mapping/homography';
import type { Region } from '#shared/mapping/schema';
import { cornerNames } from './regionEdits';

interface Props {
  region: Region;
  /** Raster pixels that look like one pixel of a 1000-wide picture. */
  unit: number;
  chosen: boolean;
  corner: number | null;
  onGrab: (event: PointerEvent, region: Region, corner: number | null) => void;
}

const thirds = [1 / 3, 2 / 3];

/** Lines at a third and two thirds of the screen's picture, bent as the display bends them. */
const gridLines = (region: Region): string[] => {
  const bend = homographyTo(region.corners);
  const line = (a: [number, number], b: [number, number]): string => {
    const [from, to] = [applyHomography(bend, a), applyHomography(bend, b)];
    return `M${from[0]} ${from[1]}L${to[0]} ${to[1]}`;
  };
  return thirds.flatMap((t) => [line([t, 0], [t, 1]), line([0, t], [1, t])]);
};

/** One region with its name, its thirds and, when chosen, its four corners. */
export const RegionShape = ({ region, unit, chosen, corner, onGrab }: Props) => {
  const colour = chosen ? 'var(--firefly)' : 'var(--quiet)';
  const [x, y] = applyHomography(homographyTo(region.corners), [0.5, 0.5]);
  return (
    <g>
      <polygon
        points={region.corners.map((point) => point.join(',')).join(' ')}
        fill={chosen ? '#d3f84b1f' : '#9db0a812'}
        stroke={colour}
        strokeWidth={(chosen ? 2.5 : 1.5) * unit}
        className="cursor-move"
        onPointerDown={(event) => onGrab(event, region, null)}
      />
      <path
        d={gridLines(region).join('')}
        stroke={colour}
        strokeOpacity={0.4}
        strokeWidth={unit}
        fill="none"
        pointerEvents="none"
      />
      <text x={x} y={y} fill="var(--text)" fontSize={22 * unit} textAnchor="middle" pointerEvents="none">
        {region.name}
      </text>
      {chosen &&
        region.corners.map(([cx, cy], i) => (
          <g
            key={cornerNames[i]}
            className="cursor-crosshair"
            onPointerDown={(event) => onGrab(event, region, i)}
          >
            <circle cx={cx} cy={cy} r={34 * unit} fill="transparent" />
            {corner === i && (
              <path
                d={`M${cx - 34 * unit} ${cy}h${22 * unit}M${cx + 12 * unit} ${cy}h${22 * unit}M${cx} ${cy - 34 * unit}v${22 * unit}M${cx} ${cy + 12 * unit}v${22 * unit}`}
                stroke="var(--firefly)"
                strokeWidth={2 * unit}
              />
            )}
            <circle
              cx={cx}
              cy={cy}
              r={9 * unit}
              fill={corner === i ? 'var(--firefly)' : '#050807'}
              stroke="var(--firefly)"
              strokeWidth={2.5 * unit}
            >
              <title>{`${cornerNames[i]} of ${region.name}`}</title>
            </circle>
          </g>
        ))}
    </g>
  );
};
