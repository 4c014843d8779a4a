/** Figures: fine first and largest, gross lighter under it, decimals smaller, nothing said in words. */
import type { ReactNode } from 'react';
import { gramsFigure, isNothing } from '../../lib/formats.ts';

/** A large figure; decimals and unit smaller. */
export function Figure({
  text,
  unit,
  size = 2,
  rouge = false,
}: {
  readonly text: string;
  readonly unit?: string;
  readonly size?: 1 | 2;
  readonly rouge?: boolean;
}) {
  const [whole, decimals] = text.split('.');
  return (
    <span className={`fig-${size} ${rouge ? 'rouge' : ''}`}>
      {whole}
      {decimals === undefined ? null : <span className="dec">.{decimals}</span>}
      {unit === undefined ? null : <span className="unit"> {unit}</span>}
    </span>
  );
}

export function LabelledFigure({
  label,
  under,
  children,
}: {
  readonly label: string;
  readonly under?: ReactNode;
  readonly children: ReactNode;
}) {
  return (
    <div>
      <div className="fig-label">{label}</div>
      {children}
      {under === undefined ? null : <div className="fig-under">{under}</div>}
    </div>
  );
}

/** Grams in a cell: three decimals, or "none" in words. */
export function Grams({ grams, zero = false }: { readonly grams: string; readonly zero?: boolean }) {
  return isNothing(grams) && !zero ? (
    <span className="none">none</span>
  ) : (
    <span className="fig">{gramsFigure(grams)}</span>
  );
}
