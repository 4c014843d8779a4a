/**
 * The pointer scale of a balance, for every figure that has a limit: level axis, a zone that is allowed, hatch beyond
 * it, level lines for the limit of error, a blade at the value. The finding is said in words; the drawing only helps.
 */
import { scaleLinear } from 'd3-scale';
import { ground } from './patterns.tsx';

interface IndexPlateProps {
  /** Value and limit in the same unit; plain numbers, for drawing only. */
  readonly value: number;
  readonly limit: number;
  /** Both ways from nothing (a difference) or from nothing upwards (a loss). */
  readonly both?: boolean;
  readonly limitName: string;
  /** The limit of error about nothing, in the same unit, where one is known. */
  readonly error?: number | null;
  /** The whole finding: "Loss of 0.441 g, inside the allowance of 0.526 g". */
  readonly finding: string;
}

const WIDTH = 560;
const LEFT = 22;
const AXIS = 40;

export function IndexPlate({
  value,
  limit,
  both = false,
  limitName,
  error = null,
  finding,
}: IndexPlateProps) {
  const far = Math.max(limit * (both ? 1.6 : 1.9), Math.abs(value) * 1.1, 0.001);
  const x = scaleLinear([both ? -far : 0, far], [LEFT, WIDTH - LEFT])
    .nice(5)
    .clamp(true);
  const [from = 0, to = far] = x.domain();
  const band = (a: number, b: number, fill: string, height = 9) => (
    <rect x={x(a)} y={AXIS - height} width={Math.max(0, x(b) - x(a))} height={height} fill={fill} />
  );
  const limits = both ? [-limit, limit] : [limit];
  const named = x(limit);
  return (
    <svg className="index-plate" viewBox={`0 -8 ${WIDTH} 74`} role="img" aria-label={finding}>
      {band(from, to, ground('beyond'))}
      {band(both ? -limit : from, limit, 'var(--leaf)')}
      {band(both ? -limit : from, limit, 'var(--zone)')}
      {error === null ? null : band(both ? -error : from, error, ground('error'))}
      <path d={`M${x(from)} ${AXIS}H${x(to)}`} stroke="var(--ink)" strokeWidth="1.3" />
      {x.ticks(25).map((tick) => (
        <path key={tick} d={`M${x(tick)} ${AXIS}v5`} stroke="var(--ink)" strokeWidth="0.8" />
      ))}
      {x.ticks(5).map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} ${AXIS}v8`} stroke="var(--ink)" strokeWidth="1.1" />
          <text x={x(tick)} y={AXIS + 21} textAnchor="middle">
            {x.tickFormat(5)(tick)}
          </text>
        </g>
      ))}
      {limits.map((at) => (
        <path key={at} d={`M${x(at)} ${AXIS - 16}V${AXIS + 8}`} stroke="var(--ink)" strokeWidth="2.2" />
      ))}
      <text x={named + 4} y="14" textAnchor={named > WIDTH - 150 ? 'end' : 'start'}>
        {limitName}
      </text>
      <path
        d={`M${x(value) - 5.5} ${AXIS - 21}h11v10l-5.5 10l-5.5-10z`}
        fill="var(--ink)"
        stroke="var(--leaf)"
        strokeWidth="1"
      />
    </svg>
  );
}

const SMALL = { width: 92, limit: 72 };

/** In tables: an ink bar with an upright at the limit; what passes it is hatched. `share` is value ÷ limit. */
export function SmallIndex({ share, finding }: { readonly share: number; readonly finding: string }) {
  const at = Math.min(SMALL.width / SMALL.limit, Math.max(0, share)) * SMALL.limit;
  return (
    <svg
      className="small-index"
      width={SMALL.width}
      height="16"
      viewBox={`0 0 ${SMALL.width} 16`}
      role="img"
      aria-label={finding}
    >
      <path d={`M0 13.5H${SMALL.width}`} stroke="var(--ink-2)" />
      <path d="M0.5 4v10" stroke="var(--ink-2)" />
      <rect x="0" y="5" width={Math.min(at, SMALL.limit)} height="8" fill="var(--ink-2)" />
      {at > SMALL.limit ? (
        <rect
          x={SMALL.limit}
          y="5.5"
          width={at - SMALL.limit - 0.5}
          height="7.5"
          fill={ground('beyond')}
          stroke="var(--rouge)"
        />
      ) : null}
      <path d={`M${SMALL.limit} 1v14`} stroke="var(--ink)" strokeWidth="2" />
    </svg>
  );
}
