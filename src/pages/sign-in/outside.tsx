/** The sheet of the pages outside: the plate with the rosette at the left, one form at the right. */
import type { ReactNode } from 'react';
import { useEffect } from 'react';
import wordmark from '../../assets/wordmark-inline.svg?raw';
import { IconSprite } from '../../components/ui/icon.tsx';
import { Rosette } from '../../components/ui/rosette.tsx';

const ORNAMENT = '9c41e7305bd82af6';

export function Outside({
  title,
  lede,
  children,
}: {
  readonly title: string;
  readonly lede: string;
  readonly children: ReactNode;
}) {
  useEffect(() => {
    document.title = `${title} · Grainward`;
  }, [title]);
  return (
    <div className="outside">
      <IconSprite />
      <aside className="outside-plate">
        <div className="ornament">
          <Rosette hash={ORNAMENT} />
        </div>
        <span className="wordmark" dangerouslySetInnerHTML={{ __html: wordmark }} />
        <p className="outside-words">
          Every gram has a place, a holder and a voucher.
          <small>The fine-metal book of goldsmiths’ workshops</small>
        </p>
      </aside>
      <main className="outside-form">
        <h1>{title}</h1>
        <p className="lede">{lede}</p>
        {children}
      </main>
    </div>
  );
}
