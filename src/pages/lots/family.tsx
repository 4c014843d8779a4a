/** A lot's family, drawn: what it came from at the left, the lot framed, what came of it at the right; and as a list. */
import { Link } from 'react-router-dom';
import type { LotRelative, LotWhole } from '../../../shared/schemas/lots.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { gramsFigure } from '../../lib/formats.ts';

const BOX = { width: 190, height: 46, gapX: 60, gapY: 12 };

interface Placed {
  readonly id: string;
  readonly code: string;
  readonly description: string;
  readonly grams: string;
  readonly x: number;
  readonly y: number;
}

/** Places one column per step away from the lot, each relative once, at its nearest step. */
function place(lot: LotWhole): {
  readonly boxes: readonly Placed[];
  readonly height: number;
  readonly width: number;
} {
  const nearest = new Map<string, LotRelative>();
  for (const one of lot.family) {
    const known = nearest.get(one.id);
    if (known === undefined || Math.abs(one.depth) < Math.abs(known.depth)) nearest.set(one.id, one);
  }
  const depths = [0, ...new Set([...nearest.values()].map((one) => one.depth))].sort((a, b) => a - b);
  const columns = depths.map((depth) => [...nearest.values()].filter((one) => one.depth === depth));
  const tallest = Math.max(1, ...columns.map((column) => column.length));
  const height = tallest * (BOX.height + BOX.gapY);
  const boxes = depths.flatMap((depth, column) => {
    const x = column * (BOX.width + BOX.gapX) + 4;
    if (depth === 0)
      return [
        {
          id: lot.id,
          code: lot.code,
          description: lot.description,
          grams: lot.gross_g,
          x,
          y: height / 2 - BOX.height / 2,
        },
      ];
    const inside = columns[column] ?? [];
    const top = (height - inside.length * (BOX.height + BOX.gapY)) / 2;
    return inside.map((one, row) => ({
      id: one.id,
      code: one.code,
      description: one.description,
      grams: one.gold_g,
      x,
      y: top + row * (BOX.height + BOX.gapY),
    }));
  });
  return { boxes, height, width: depths.length * (BOX.width + BOX.gapX) };
}

export function Family({ lot }: { readonly lot: LotWhole }) {
  if (lot.family.length === 0)
    return <p className="none">It came in as it is, and nothing was made of it yet.</p>;
  const { boxes, height, width } = place(lot);
  const at = new Map(boxes.map((box) => [box.id, box]));
  const most = lot.family.reduce(
    (top, one) => (gramsText(one.gold_g) > top ? gramsText(one.gold_g) : top),
    1n,
  );
  const thick = (one: LotRelative) =>
    2 + Number.parseInt(((gramsText(one.gold_g) * 14n) / most).toString(), 10);
  return (
    <>
      <div className="family" role="region" aria-label="Family, drawn" tabIndex={0}>
        <svg
          width={width}
          height={height}
          viewBox={`0 0 ${width} ${height}`}
          role="group"
          aria-label={`Family of ${lot.code}`}
        >
          {lot.family.map((one) => {
            const [from, to] =
              one.depth < 0 ? [at.get(one.id), at.get(one.next_id)] : [at.get(one.next_id), at.get(one.id)];
            if (from === undefined || to === undefined) return null;
            const [x1, y1, x2, y2] = [
              from.x + BOX.width,
              from.y + BOX.height / 2,
              to.x,
              to.y + BOX.height / 2,
            ];
            const middle = (x1 + x2) / 2;
            return (
              <path
                key={`${one.id}${one.next_id}`}
                d={`M${x1} ${y1}C${middle} ${y1} ${middle} ${y2} ${x2} ${y2}`}
                fill="none"
                stroke="var(--brass-line)"
                strokeWidth={thick(one)}
                opacity="0.8"
              />
            );
          })}
          {boxes.map((box) => (
            <Link key={box.id} to={`/lots/${box.id}`} aria-label={`${box.code} ${box.description}`}>
              <rect
                x={box.x}
                y={box.y}
                width={BOX.width}
                height={BOX.height}
                fill={box.id === lot.id ? 'var(--act-tint)' : 'var(--field)'}
                stroke={box.id === lot.id ? 'var(--act)' : 'var(--rule-strong)'}
                strokeWidth={box.id === lot.id ? 2.5 : 1}
              />
              <text
                x={box.x + 10}
                y={box.y + 19}
                style={{ fill: 'var(--ink)', font: '600 13px var(--font-text)' }}
              >
                {box.code}
              </text>
              <text
                x={box.x + 10}
                y={box.y + 37}
                style={{ fill: 'var(--ink-2)', font: '400 12px var(--font-text)' }}
              >
                {box.description.slice(0, 26)}
              </text>
            </Link>
          ))}
        </svg>
      </div>
      <details className="mt-3">
        <summary>The same as a list</summary>
        <ul>
          {lot.family.map((one) => (
            <li key={`${one.id}${one.next_id}`}>
              {one.depth < 0 ? 'came from' : 'went into'} <Link to={`/lots/${one.id}`}>{one.code}</Link>{' '}
              {one.description}, {gramsFigure(one.gold_g)} g fine gold
            </li>
          ))}
        </ul>
      </details>
    </>
  );
}
