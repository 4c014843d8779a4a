/** Where a published figure comes from, and how sure it is. The product shows both beside the figure. */

/** `read`: seen in the source's text. `from memory`: general knowledge that was not looked up; never its own words. */
export type Certainty = 'read' | 'from memory';

export interface PublishedSource {
  readonly title: string;
  readonly certainty: Certainty;
}

export const readIn = (title: string): PublishedSource => ({ title, certainty: 'read' });
export const fromMemory = (title: string): PublishedSource => ({ title, certainty: 'from memory' });
