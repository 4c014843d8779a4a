/**
 * A chart that answers one question: up to three lines over the same spans of time, named at their end; a point that
 * passes its limit is a triangle, what lies beyond the limit is hatched. One stop for the keyboard: left and right
 * read the points out. The table with the same figures follows it.
 */
import { useState } from 'react';
import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { ground } from './patterns.tsx';

export interface ChartLine {
  readonly name: string;
  readonly tone: 'ink' | 'rouge' | 'verd';
  readonly points: readonly (number | null)[];
}

interface LineChartProps {
  readonly title: string;
  readonly unit: string;
  readonly labels: readonly string[];
  readonly lines: readonly ChartLine[];
  readonly limit?: number | null;
  /** Words at the end of the limit's line. */
  readonly limitName?: string;
}

const SIZE = { width: 940, height: 270, left: 44, right: 150, top: 30, bottom: 34 };
const TONES = { ink: 'var(--ink)', rouge: 'var(--rouge)', verd: 'var(--verd)' } as const;
/** Names at the ends of lines stand at least so far apart. */
const NAME_HEIGHT = 18;

export function LineChart(props: LineChartProps) {
  const { title, unit, labels, lines, limit = null, limitName = 'limit' } = props;
  const [at, setAt] = useState<number | null>(null);
  const values = lines.flatMap((one) => one.points).filter((value) => value !== null);
  const top = Math.max(...values, limit ?? 0, 0.1) * 1.18;
  const right = SIZE.width - SIZE.right;
  const single = labels.length < 2;
  const x = scaleLinear([0, Math.max(1, labels.length - 1)], [SIZE.left + (single ? 60 : 0), right]);
  const y = scaleLinear([0, top], [SIZE.height - SIZE.bottom, SIZE.top]).nice(4);
  const read = at === null ? '' : `${labels[at] ?? ''}: ${wordsAt(lines, at)} ${unit}`;
  const move = (by: number) =>
    setAt((before) => Math.min(labels.length - 1, Math.max(0, (before ?? -1) + by)));
  const every = Math.ceil(labels.length / 12);
  return (
    <figure>
      <svg
        className="chart"
        viewBox={`0 0 ${SIZE.width} ${SIZE.height}`}
        role="slider"
        aria-label={`${title}, ${unit}`}
        aria-valuetext={read === '' ? `${labels.length} points` : read}
        aria-valuenow={at ?? 0}
        aria-valuemin={0}
        aria-valuemax={Math.max(0, labels.length - 1)}
        tabIndex={0}
        onKeyDown={(event) => {
          if (event.key === 'ArrowRight') move(1);
          if (event.key === 'ArrowLeft') move(-1);
        }}
      >
        <text x="0" y="14">
          {unit}
        </text>
        {limit === null ? null : (
          <rect
            x={SIZE.left}
            y={SIZE.top}
            width={right - SIZE.left}
            height={Math.max(0, y(limit) - SIZE.top)}
            fill={ground('beyond')}
            opacity="0.5"
          />
        )}
        {y.ticks(4).map((tick) => (
          <g key={tick}>
            <path d={`M${SIZE.left} ${y(tick)}H${right}`} stroke="var(--rule)" />
            <text x={SIZE.left - 8} y={y(tick) + 4} textAnchor="end">
              {y.tickFormat(4)(tick)}
            </text>
          </g>
        ))}
        {labels.map((label, index) =>
          index % every === 0 ? (
            <text key={label} x={x(index)} y={SIZE.height - 8} textAnchor="middle">
              {label}
            </text>
          ) : null,
        )}
        {limit === null ? null : (
          <path d={`M${SIZE.left} ${y(limit)}H${right}`} stroke="var(--ink)" strokeWidth="2" />
        )}
        {lines.map((one) => (
          <Line key={one.name} one={one} x={(index) => x(index)} y={(value) => y(value)} limit={limit} />
        ))}
        {namesAtEnds(
          lines,
          limit,
          limitName,
          (index) => x(index),
          (value) => y(value),
        ).map((name) => (
          <text key={name.words} x={name.x} y={name.y + 4} style={{ fill: name.colour, fontWeight: 600 }}>
            {name.words}
          </text>
        ))}
        {at === null ? null : (
          <path d={`M${x(at)} ${SIZE.top}V${SIZE.height - SIZE.bottom}`} stroke="var(--focus)" />
        )}
      </svg>
      <figcaption className="fig-under" aria-live="polite">
        {read}
      </figcaption>
    </figure>
  );
}

const wordsAt = (lines: readonly ChartLine[], at: number): string =>
  lines.map((one) => `${one.name} ${one.points[at]?.toFixed(2) ?? 'none'}`).join(', ');

interface EndName {
  readonly words: string;
  readonly colour: string;
  readonly x: number;
  readonly y: number;
}

/** The names of the lines beside their last points, moved apart where they would cover each other. */
function namesAtEnds(
  lines: readonly ChartLine[],
  limit: number | null,
  limitName: string,
  x: (index: number) => number,
  y: (value: number) => number,
): readonly EndName[] {
  const ends = lines.flatMap((one): EndName[] => {
    const last = one.points.findLastIndex((point) => point !== null);
    const value = one.points[last];
    if (value === undefined || value === null) return [];
    return [{ words: one.name, colour: TONES[one.tone], x: x(last) + 12, y: y(value) }];
  });
  const all =
    limit === null
      ? ends
      : [...ends, { words: limitName, colour: 'var(--ink)', x: SIZE.width - SIZE.right + 12, y: y(limit) }];
  const sorted = [...all].sort((a, b) => a.y - b.y);
  return sorted.reduce<readonly EndName[]>((placed, name) => {
    const above = placed.at(-1);
    const room = above === undefined ? name.y : Math.max(name.y, above.y + NAME_HEIGHT);
    return [...placed, { ...name, y: room }];
  }, []);
}

interface LineProps {
  readonly one: ChartLine;
  readonly x: (index: number) => number;
  readonly y: (value: number) => number;
  readonly limit: number | null;
}

function Line({ one, x, y, limit }: LineProps) {
  const points = one.points.map((value, index) => ({ value, index }));
  const path = line<{ value: number | null; index: number }>()
    .defined((point) => point.value !== null)
    .x((point) => x(point.index))
    .y((point) => y(point.value ?? 0));
  const look = { fill: 'var(--leaf)', stroke: TONES[one.tone], strokeWidth: 2 };
  return (
    <g>
      <path
        d={path(points) ?? ''}
        fill="none"
        stroke={TONES[one.tone]}
        strokeWidth="2"
        strokeDasharray={one.tone === 'verd' ? '7 5' : undefined}
      />
      {points.map(({ value, index }) => {
        if (value === null) return null;
        const [left, up] = [x(index), y(value)];
        return limit !== null && value > limit ? (
          <path key={index} d={`M${left} ${up - 7}l7 12h-14z`} {...look} />
        ) : (
          <circle key={index} cx={left} cy={up} r="4" {...look} />
        );
      })}
    </g>
  );
}
