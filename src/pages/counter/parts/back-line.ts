/** A line of what came back, as it is typed, and as it stands in the body. */
import type { TypedWeighing } from '../../../forms/typed.ts';
import { noWeighing, orNull, typedWeighing } from '../../../forms/typed.ts';

export type BackKind = 'unused' | 'work' | 'finished_work' | 'casting' | 'scrap' | 'filings' | 'kept';

export interface BackLine {
  readonly kind: BackKind;
  /** Unused, kept: the lot; scrap: the lot that it was cut from, or none. */
  readonly lot_id: string;
  readonly weighing: TypedWeighing;
  readonly description: string;
  readonly pieces: string;
  /** Work: none stays at the bench. */
  readonly to_id: string;
}

export const BACK_WORDS: Readonly<Record<BackKind, string>> = {
  unused: 'Unused metal',
  work: 'Work in hand',
  finished_work: 'Finished work',
  casting: 'Castings',
  scrap: 'Clean scrap',
  filings: 'Filings, lemel',
  kept: 'Kept for several jobs',
};

export const backLine = (kind: BackKind, lot_id = ''): BackLine => ({
  kind,
  lot_id,
  weighing: noWeighing,
  description: '',
  pieces: kind === 'work' || kind === 'finished_work' || kind === 'casting' ? '1' : '',
  to_id: '',
});

/** Where a line stands in the body: its list and its place in it, so that errors find it. */
export function fieldOf(lines: readonly BackLine[], index: number): string {
  const kind = listOf(lines[index]?.kind ?? 'work');
  const before = lines.slice(0, index).filter((line) => listOf(line.kind) === kind).length;
  return `works.0.${kind}.${before}`;
}

function listOf(kind: BackKind): 'unused' | 'made' | 'scrap' | 'filings' | 'kept' {
  return kind === 'unused' || kind === 'scrap' || kind === 'filings' || kind === 'kept' ? kind : 'made';
}

/** The lists of a job's body. */
export function workBody(lines: readonly BackLine[]) {
  const of = (kind: 'unused' | 'made' | 'scrap' | 'filings' | 'kept') =>
    lines
      .map((line, index) => ({ line, field: fieldOf(lines, index) }))
      .filter(({ line }) => listOf(line.kind) === kind);
  return {
    unused: of('unused').map(({ line, field }) => ({
      lot_id: line.lot_id,
      weighing: typedWeighing(line.weighing, `${field}.weighing`),
      pieces: orNull(line.pieces),
    })),
    scrap: of('scrap').map(({ line, field }) => ({
      from_lot_id: orNull(line.lot_id),
      weighing: typedWeighing(line.weighing, `${field}.weighing`),
    })),
    filings: of('filings').map(({ line, field }) => ({
      weighing: typedWeighing(line.weighing, `${field}.weighing`),
    })),
    kept: of('kept').map(({ line, field }) => ({
      lot_id: line.lot_id,
      weighing: typedWeighing(line.weighing, `${field}.weighing`),
    })),
    made: of('made').map(({ line, field }) => ({
      form: line.kind,
      description: line.description,
      weighing: typedWeighing(line.weighing, `${field}.weighing`),
      pieces: orNull(line.pieces),
      to_id: orNull(line.to_id),
    })),
  };
}
