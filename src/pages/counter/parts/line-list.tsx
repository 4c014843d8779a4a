/** The lines of a delivery in the margin: which are weighed, which one is at hand; add one, take one away. */
import { readTypedMass } from '../../../../shared/mass/typed-mass.ts';
import { Button } from '../../../components/ui/button.tsx';
import { ugFigure } from '../../../lib/formats.ts';
import type { ReceiptLine } from './receipt-line.ts';

interface LineListProps {
  readonly lines: readonly ReceiptLine[];
  readonly at: number;
  readonly onGo: (index: number) => void;
  readonly onAdd: () => void;
  readonly onTakeAway: () => void;
}

export function LineList({ lines, at, onGo, onAdd, onTakeAway }: LineListProps) {
  return (
    <>
      <ol className="line-list">
        {lines.map((line, index) => (
          <li key={index}>
            <button
              type="button"
              aria-current={index === at ? 'step' : undefined}
              onClick={() => onGo(index)}
            >
              <span className="line-number">{index + 1}</span>
              <b>{line.description || 'not named yet'}</b>
              <span className="line-mass">{weighed(line)}</span>
            </button>
          </li>
        ))}
      </ol>
      <Button kind="quiet" icon="plus" onPress={onAdd}>
        Add a line
      </Button>
      {lines.length > 1 ? (
        <Button kind="quiet" onPress={onTakeAway}>
          Take this line away
        </Button>
      ) : null}
    </>
  );
}

/** Gross as it was typed, so that a line that is not weighed yet is seen at a glance. */
function weighed(line: ReceiptLine): string {
  const read = readTypedMass(line.weighing.gross);
  return read.ok ? ugFigure(read.ug) : 'not weighed';
}
