/** The right side of a weigh-back: what came back, stays or was made, line by line at the balance, and the loss. */
import type { VoucherDraft } from '../../../../shared/book/draft.ts';
import type { Facts } from '../../../../shared/book/facts.ts';
import type { JobHolding } from '../../../../shared/book/holding.ts';
import type { AccountRow } from '../../../../shared/schemas/registers.ts';
import { sumMass } from '../../../../shared/mass/vector.ts';
import { Button } from '../../../components/ui/button.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { ugFigure } from '../../../lib/formats.ts';
import type { BackKind, BackLine } from './back-line.ts';
import { BACK_WORDS, backLine, fieldOf } from './back-line.ts';
import { placeOptions } from '../../../components/domain/places.ts';
import { WeighingFields } from '../../../components/domain/weighing-fields.tsx';

interface BackLinesProps {
  readonly facts: Facts;
  readonly out: readonly JobHolding[];
  readonly accounts: readonly AccountRow[];
  readonly lines: readonly BackLine[];
  readonly onChange: (lines: readonly BackLine[]) => void;
  readonly errorOf: (field: string) => string | null;
  readonly voucher: VoucherDraft | null;
}

const KINDS: readonly BackKind[] = ['unused', 'work', 'finished_work', 'casting', 'scrap', 'filings', 'kept'];

export function BackLines({ facts, out, accounts, lines, onChange, errorOf, voucher }: BackLinesProps) {
  const total = sumMass(out.map((row) => row.mass));
  const loss = voucher?.entries.find(
    (entry) => facts.accounts.get(entry.account_id)?.kind === 'working_loss',
  );
  const add = (kind: BackKind) =>
    onChange([...lines, backLine(kind, kind === 'unused' || kind === 'scrap' ? (out[0]?.lot_id ?? '') : '')]);
  const change = (index: number, line: BackLine) =>
    onChange(lines.map((one, at) => (at === index ? line : one)));
  return (
    <section aria-label="Back, and kept">
      <h2>Back, and kept</h2>
      {lines.map((line, index) => (
        <div key={index} className="grid gap-3 border-b border-rule py-3">
          <div className="flex items-center justify-between">
            <b>{BACK_WORDS[line.kind]}</b>
            <Button kind="quiet" onPress={() => onChange(lines.filter((_, at) => at !== index))}>
              Weighed wrong, clear the line
            </Button>
          </div>
          <LineFields
            line={line}
            field={fieldOf(lines, index)}
            onChange={(next) => change(index, next)}
            {...{ facts, out, accounts, errorOf }}
          />
        </div>
      ))}
      <div className="flex flex-wrap gap-2 py-3">
        {KINDS.map((kind) => (
          <Button key={kind} icon="plus" onPress={() => add(kind)}>
            {BACK_WORDS[kind]}
          </Button>
        ))}
      </div>
      {loss === undefined ? null : (
        <div className="line">
          <b>Working loss</b>
          <span className="fig text-right text-ink-2">{ugFigure(loss.mass.gross)} g</span>
          <b className="fig text-right">{ugFigure(loss.mass.gold > 0n ? loss.mass.gold : loss.mass.gross)}</b>
        </div>
      )}
      <div className="side-total">
        <span>{voucher === null ? 'Not weighed yet' : 'Back, kept and lost'}</span>
        <span className="fig">{voucher === null ? '' : `${ugFigure(total.gross)} g`}</span>
      </div>
    </section>
  );
}

interface LineFieldsProps extends Pick<BackLinesProps, 'facts' | 'out' | 'accounts' | 'errorOf'> {
  readonly line: BackLine;
  readonly field: string;
  readonly onChange: (line: BackLine) => void;
}

function LineFields({ line, field, onChange, facts, out, accounts, errorOf }: LineFieldsProps) {
  const set = (change: Partial<BackLine>) => onChange({ ...line, ...change });
  const rows =
    line.kind === 'kept'
      ? facts.job_holdings.filter((row) => row.job_id === null && row.mass.gross > 0n)
      : out;
  const lots = rows.flatMap((row) => {
    const lot = facts.lots.get(row.lot_id);
    return lot === undefined ? [] : [{ value: lot.id, label: `${lot.code} ${lot.description}` }];
  });
  const isMade = line.kind === 'work' || line.kind === 'finished_work' || line.kind === 'casting';
  return (
    <div className="fields">
      {isMade || line.kind === 'filings' ? null : (
        <SelectField
          label={line.kind === 'scrap' ? 'Cut from' : 'Lot'}
          none={line.kind === 'scrap' ? 'It can’t be said' : 'Choose a lot'}
          value={line.lot_id}
          onChange={(lot_id) => set({ lot_id })}
          options={lots}
          error={errorOf(`${field}.lot_id`) ?? errorOf(`${field}.from_lot_id`)}
        />
      )}
      {isMade ? (
        <TextField
          label="In a few words"
          value={line.description}
          onChange={(description) => set({ description })}
          error={errorOf(`${field}.description`)}
        />
      ) : null}
      <WeighingFields
        value={line.weighing}
        onChange={(weighing) => set({ weighing })}
        errorOf={(name) => errorOf(`${field}.weighing.${name}`)}
        stones={isMade}
      />
      {isMade ? (
        <>
          <TextField
            label="Pieces"
            inputMode="numeric"
            value={line.pieces}
            onChange={(pieces) => set({ pieces })}
            error={errorOf(`${field}.pieces`)}
          />
          <SelectField
            label="Goes to"
            none="Stays at the bench"
            value={line.to_id}
            onChange={(to_id) => set({ to_id })}
            options={placeOptions(accounts, ['safe', 'bench', 'station', 'outworker'])}
            error={errorOf(`${field}.to_id`)}
          />
        </>
      ) : null}
    </div>
  );
}
