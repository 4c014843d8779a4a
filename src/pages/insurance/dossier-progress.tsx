/** How far a dossier is that is being put together: step, parts, bar; it goes on when the page is closed. */
import { StatusWord } from '../../components/ui/status-word.tsx';
import { figureText } from '../../lib/formats.ts';
import type { Dossier } from '../../queries/dossiers.ts';

export function DossierProgress({ dossier }: { readonly dossier: Dossier }) {
  const { step, done_parts, all_parts } = dossier;
  const [done, all] = [done_parts ?? 0, all_parts ?? 0];
  const percent = all === 0 ? 0 : Math.round((done / all) * 100);
  return (
    <div className="mt-4">
      <p className="m-0 flex flex-wrap gap-4" role="status">
        <StatusWord status="Being put together" />
        <span className="text-ink-2">
          {step === null || step === '' ? 'waits for its turn' : step}
          {all === 0 ? '' : `, ${figureText(String(done))} of ${figureText(String(all))}`}
        </span>
      </p>
      <div
        className="progress"
        role="progressbar"
        aria-label="The dossier is being put together"
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent}
      >
        <div style={{ width: `${percent}%` }} />
      </div>
      <p className="fig-under">
        You may close this page. It goes on, and the dossier stands here when it is ready.
      </p>
    </div>
  );
}
