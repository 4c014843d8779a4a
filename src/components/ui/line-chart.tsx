/**
 * A chart that answers one question: up to three lines over the same months, named at their end; a point that passes
 * its limit is a triangle. One stop for the keyboard: left and right read the points out. The table follows it.
 */
import { useState } from 'react';
import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';

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
}

const SIZE = { width: 860, height: 240, left: 44, right: 130, top: 20, bottom: 28 };
const TONES = { ink: 'var(--ink)', rouge: 'var(--rouge)', verd: 'var(--verd)' } as const;

export function LineChart({ title, unit, labels, lines, limit = null }: LineChartProps) {
  const [at, setAt] = useState<number | null>(null);
  const values = lines.flatMap((one) => one.points).filter((value) => value !== null);
  const top = Math.max(...values, limit ?? 0, 0.1) * 1.15;
  const x = scaleLinear([0, Math.max(1, labels.length - 1)], [SIZE.left, SIZE.width - SIZE.right]);
  const y = scaleLinear([0, top], [SIZE.height - SIZE.bottom, SIZE.top]);
  const read =
    at === null
      ? ''
      : `${labels[at] ?? ''}: ${lines.map((one) => `${one.name} ${one.points[at]?.toFixed(2) ?? 'none'}`).join(', ')} ${unit}`;
  const move = (by: number) =>
    setAt((before) => Math.min(labels.length - 1, Math.max(0, (before ?? -1) + by)));
  return (
    <figure>
      <svg
        className="chart"
        viewBox={`0 0 ${SIZE.width} ${SIZE.height}`}
        role="slider"
        aria-label={`${title}, ${unit}`}
        aria-valuetext={read}
        aria-valuenow={at ?? 0}
        aria-valuemin={0}
        aria-valuemax={labels.length - 1}
        tabIndex={0}
        onKeyDown={(event) => {
          if (event.key === 'ArrowRight') move(1);
          if (event.key === 'ArrowLeft') move(-1);
        }}
      >
        <text x={SIZE.left} y="12">
          {unit}
        </text>
        {y.ticks(4).map((tick) => (
          <g key={tick}>
            <path d={`M${SIZE.left} ${y(tick)}H${SIZE.width - SIZE.right}`} stroke="var(--rule)" />
            <text x={SIZE.left - 8} y={y(tick) + 4} textAnchor="end">
              {tick}
            </text>
          </g>
        ))}
        {labels.map((label, index) => (
          <text key={label} x={x(index)} y={SIZE.height - 8} textAnchor="middle">
            {label}
          </text>
        ))}
        {limit === null ? null : (
          <path
            d={`M${SIZE.left} ${y(limit)}H${SIZE.width - SIZE.right}`}
            stroke="var(--ink)"
            strokeWidth="2"
            strokeDasharray="2 4"
          />
        )}
        {lines.map((one) => (
          <Line key={one.name} one={one} x={(index) => x(index)} y={(value) => y(value)} limit={limit} />
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
  const last = points.findLast((point) => point.value !== null);
  const colour = TONES[one.tone];
  return (
    <g>
      <path
        d={path(points) ?? ''}
        fill="none"
        stroke={colour}
        strokeWidth="2"
        strokeDasharray={one.tone === 'verd' ? '7 5' : undefined}
      />
      {points.map(({ value, index }) =>
        value === null ? null : limit !== null && value > limit ? (
          <path
            key={index}
            d={`M${x(index)} ${y(value) - 6}l6 10h-12z`}
            fill="var(--leaf)"
            stroke={colour}
            strokeWidth="2"
          />
        ) : (
          <circle
            key={index}
            cx={x(index)}
            cy={y(value)}
            r="4"
            fill="var(--leaf)"
            stroke={colour}
            strokeWidth="2"
          />
        ),
      )}
      {last === undefined ? null : (
        <text x={x(last.index) + 10} y={y(last.value ?? 0) + 4} style={{ fill: colour, fontWeight: 600 }}>
          {one.name}
        </text>
      )}
    </g>
  );
}
