/** A goldsmith's request for metal, and those that still wait. */
import { useState } from 'react';
import { LOT_FORMS } from '../../../shared/book/lot.ts';
import type { MyBenchJson } from '../../../shared/schemas/today.ts';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { orNull, typedGrams } from '../../forms/typed.ts';
import { TypedError } from '../../forms/use-event-form.ts';
import { gramsFigure, words } from '../../lib/formats.ts';
import { useWrite } from '../../queries/writes.ts';

const EMPTY = { alloy: '', form: '', mass: '', job_id: '', note: '' };

export function AskForMetal({ bench }: { readonly bench: MyBenchJson }) {
  const [values, setValues] = useState({ ...EMPTY, place_id: bench.places[0]?.id ?? '' });
  const [error, setError] = useState<string | null>(null);
  const { busy, problem, write } = useWrite();
  const set = (change: Partial<typeof values>) => setValues((before) => ({ ...before, ...change }));
  const ask = async () => {
    setError(null);
    try {
      const body = {
        place_id: values.place_id,
        alloy: orNull(values.alloy),
        form: orNull(values.form),
        mass_g: typedGrams(values.mass, 'mass_g'),
        job_id: orNull(values.job_id),
        note: values.note,
      };
      if (await write('POST', '/metal-requests', body)) set(EMPTY);
    } catch (reason) {
      if (!(reason instanceof TypedError)) throw reason;
      setError(reason.message);
    }
  };
  return (
    <>
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      {bench.requests.map((row) => (
        <Notice
          key={row.id}
          severity="waiting"
          what={`${gramsFigure(row.mass_g)} g of ${row.alloy ?? 'metal'} ${row.form ?? ''} is asked for.`}
          action={
            <Button onPress={() => void write('POST', `/metal-requests/${row.id}/withdraw`, {})}>
              Withdraw it
            </Button>
          }
        >
          {row.job_code === null ? '' : `Job ${row.job_code}.`}
        </Notice>
      ))}
      <div className="fields">
        {bench.places.length < 2 ? null : (
          <SelectField
            label="Bench"
            value={values.place_id}
            onChange={(place_id) => set({ place_id })}
            options={bench.places.map(({ id, name }) => ({ value: id, label: name }))}
          />
        )}
        <SelectField
          label="Alloy"
          none="Any"
          value={values.alloy}
          onChange={(alloy) => set({ alloy })}
          options={bench.alloys.map((name) => ({ value: name, label: name }))}
        />
        <SelectField
          label="Form"
          none="Any"
          value={values.form}
          onChange={(form) => set({ form })}
          options={LOT_FORMS.filter((form) => form !== 'account').map((form) => ({
            value: form,
            label: words(form),
          }))}
        />
        <WeightField label="How much" value={values.mass} onChange={(mass) => set({ mass })} error={error} />
        <SelectField
          label="Job"
          none="Stock work"
          value={values.job_id}
          onChange={(job_id) => set({ job_id })}
          options={bench.jobs.map(({ id, code, title }) => ({ value: id, label: `${code} ${title}` }))}
        />
        <TextField label="Remark" value={values.note} onChange={(note) => set({ note })} />
      </div>
      <p className="mt-4">
        <Button kind="primary" icon="in" busy={busy ? 'Asking …' : false} onPress={() => void ask()}>
          Ask for metal
        </Button>
      </p>
    </>
  );
}
