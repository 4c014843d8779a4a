/** "Where it lies": the parts of one whole side by side, to one scale, and the key that names their grounds. */

export type ShareGround = 'ink' | 'brass' | 'grain' | 'open';

export interface SharePart {
  readonly name: string;
  readonly ug: bigint;
  readonly ground: ShareGround;
}

/** The figures stand in the table beside it, so the bar itself is not read out. */
export function ShareBar({ parts }: { readonly parts: readonly SharePart[] }) {
  const there = parts.filter((part) => part.ug > 0n);
  if (there.length === 0) return null;
  return (
    <div className="share-bar" aria-hidden="true">
      {there.map((part) => (
        <div key={part.name} className={`share ${part.ground}`} style={{ flexGrow: part.ug.toString() }} />
      ))}
    </div>
  );
}

export function ShareKey({ parts }: { readonly parts: readonly Omit<SharePart, 'ug'>[] }) {
  return (
    <ul className="share-key">
      {parts.map((part) => (
        <li key={part.name}>
          <span className={`share ${part.ground}`} />
          {part.name}
        </li>
      ))}
    </ul>
  );
}
