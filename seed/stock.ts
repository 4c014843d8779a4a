/** What the demo's keeper believes to be in the safe, by alloy, so that no issue asks for more than is there. */
interface Pile {
  readonly lot_id: string;
  mg: number;
}

export class Stock {
  readonly #piles = new Map<string, Pile[]>();
  /** The open tray of a kind ("scrap 750 yellow"): what comes back joins it. */
  readonly trays = new Map<string, string>();

  add(alloy: string, lot_id: string, mg: number): void {
    this.#piles.set(alloy, [...(this.#piles.get(alloy) ?? []), { lot_id, mg }]);
  }

  /** The lot to take so many milligrams of an alloy from, or null where there is not enough in one lot. */
  take(alloy: string, mg: number): string | null {
    const pile = this.#piles.get(alloy)?.find((known) => known.mg > mg);
    if (pile === undefined) return null;
    pile.mg -= mg;
    return pile.lot_id;
  }

  putBack(alloy: string, lot_id: string, mg: number): void {
    const pile = this.#piles.get(alloy)?.find((known) => known.lot_id === lot_id);
    if (pile !== undefined) pile.mg += mg;
  }
}
