/**
 * The pointer scale of a balance, for every figure that has a limit: level axis, a zone that is allowed, hatch beyond
 * it, a blade at the value. The finding is said in words; the drawing only helps.
 */
interface IndexPlateProps {
  /** Value and limit in the same unit; plain numbers, for drawing only. */
  readonly value: number;
  readonly limit: number;
  /** Both ways from nothing (a difference) or from nothing upwards (a loss). */
  readonly both?: boolean;
  readonly limitName: string;
  /** The whole finding: "Loss of 0.441 g, inside the allowance of 0.526 g". */
  readonly finding: string;
}

const WIDTH = 560;
const LEFT = 20;
const SPAN = WIDTH - 2 * LEFT;

export function IndexPlate({ value, limit, both = false, limitName, finding }: IndexPlateProps) {
  const far = Math.max(limit * 2, Math.abs(value) * 1.15, 0.001);
  const from = both ? -far : 0;
  const x = (at: number) => LEFT + ((Math.min(far, Math.max(from, at)) - from) / (far - from)) * SPAN;
  const ticks = Array.from({ length: 11 }, (_, index) => from + ((far - from) * index) / 10);
  const zone = both ? x(-limit) : x(0);
  return (
    <svg className="index-plate" viewBox={`0 0 ${WIDTH} 62`} role="img" aria-label={finding}>
      <defs>
        <pattern id="beyond" width="6" height="6" patternUnits="userSpaceOnUse">
          <path d="M0 6L6 0" stroke="var(--rouge)" strokeWidth="1.2" opacity="0.75" />
        </pattern>
      </defs>
      <rect x={x(from)} y="26" width={SPAN} height="10" fill="url(#beyond)" />
      <rect x={zone} y="26" width={Math.max(0, x(limit) - zone)} height="10" fill="var(--zone)" />
      <path d={`M${LEFT} 37H${LEFT + SPAN}`} stroke="var(--ink)" />
      {ticks.map((tick) => (
        <path key={tick} d={`M${x(tick)} 37v5`} stroke="var(--ink)" />
      ))}
      {(both ? [-limit, limit] : [limit]).map((at) => (
        <path key={at} d={`M${x(at)} 20v20`} stroke="var(--ink)" strokeWidth="2" />
      ))}
      <text x={x(limit)} y="14" textAnchor={x(limit) > WIDTH - 120 ? 'end' : 'middle'}>
        {limitName}
      </text>
      <text x={x(from)} y="56" textAnchor="start">
        {from.toFixed(2)}
      </text>
      <text x={x(far)} y="56" textAnchor="end">
        {far.toFixed(2)}
      </text>
      <path d={`M${x(value) - 5} 12h10v10l-5 8-5-8z`} fill="var(--ink)" />
    </svg>
  );
}

/** In tables: an ink bar with an upright at the limit; what passes it is hatched. */
export function SmallIndex({ share, finding }: { readonly share: number; readonly finding: string }) {
  const at = Math.min(1.25, Math.max(0, share)) * 72;
  return (
    <svg className="small-index" width="92" height="14" viewBox="0 0 92 14" role="img" aria-label={finding}>
      <path d="M0 12.5H90" stroke="var(--rule-strong)" />
      <rect x="0" y="3" width={Math.min(at, 72)} height="8" fill="var(--ink)" />
      {at > 72 ? (
        <rect x="72" y="3" width={at - 72} height="8" fill="url(#beyond)" stroke="var(--rouge)" />
      ) : null}
      <path d="M72 0v14" stroke="var(--ink)" strokeWidth="2" />
    </svg>
  );
}
