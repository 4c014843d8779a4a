/** A page is one ruled sheet: a margin that names and explains, the double red line, and the entries at the right. */
import type { ReactNode } from 'react';
import { useEffect, useRef } from 'react';

interface PageProps {
  readonly title: string;
  /** The title as it is drawn, where it is more than its words. */
  readonly drawn?: ReactNode;
  readonly lede?: ReactNode;
  readonly actions?: ReactNode;
  /** What the margin of the first entry says. */
  readonly margin?: ReactNode;
  readonly nav?: ReactNode;
  readonly children?: ReactNode;
  /** What stands in the first entry, under the title. */
  readonly first?: ReactNode;
}

export function Page({ title, drawn = title, lede, actions, margin, nav, first, children }: PageProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    document.title = `${title} · Grainward`;
    heading.current?.focus({ preventScroll: true });
  }, [title]);
  return (
    <div className="sheet">
      <div className="entry">
        <div className="margin">{margin}</div>
        <div className="body">
          {nav}
          <div className="page-head">
            <h1 tabIndex={-1} ref={heading}>
              {drawn}
            </h1>
            {lede === undefined ? null : <span className="lede">{lede}</span>}
            {actions === undefined ? null : <div className="actions">{actions}</div>}
          </div>
          {first}
        </div>
      </div>
      {children}
    </div>
  );
}

export function Section({
  heading,
  notes,
  children,
}: {
  readonly heading: string;
  readonly notes?: ReactNode;
  readonly children: ReactNode;
}) {
  return (
    <section className="entry" aria-label={heading}>
      <div className="margin">
        <h2>{heading}</h2>
        {notes}
      </div>
      <div className="body">{children}</div>
    </section>
  );
}
