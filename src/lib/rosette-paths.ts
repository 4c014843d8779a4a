/** The curves of a rosette as SVG paths, from the first eight bytes of a hash (DESIGN-LOOK section 6). */

interface Ring {
  readonly m: number;
  readonly a: number;
  readonly k: number;
  readonly s: number;
  readonly e: number;
  readonly u: number;
  readonly curves: number;
}

const STEPS = 360;

export function rosettePaths(hash: string, radius: number): readonly string[] {
  const b = Array.from(
    { length: 8 },
    (_, index) => Number.parseInt(hash.slice(index * 2, index * 2 + 2), 16) || 0,
  );
  const at = (index: number) => b[index] ?? 0;
  const k1 = 8 + (at(0) % 11);
  const k2 = 6 + (at(1) % 12);
  const k3 = 5 + (at(2) % 9);
  const n = 12 + (at(3) % 11);
  const rings: readonly Ring[] = [
    { m: 0.82, a: 0.155, k: 2 + (at(3) % 5), s: k1, e: 0.022, u: at(5) / 41, curves: n },
    { m: 0.55, a: 0.135, k: k2, s: k2, e: 0.03, u: at(6) / 41, curves: Math.round(n * 0.75) },
    { m: 0.335, a: 0.1, k: 2 + (at(4) % 4), s: k3, e: 0.022, u: at(7) / 41, curves: Math.round(n * 0.6) },
    { m: 0.16, a: 0.07, k: k1, s: 0, e: 0, u: 0, curves: Math.round(n * 0.4) },
  ];
  return rings.flatMap((ring) =>
    Array.from({ length: ring.curves }, (_, i) => curve(ring, (2 * Math.PI * i) / ring.curves, radius)),
  );
}

function curve(ring: Ring, p: number, radius: number): string {
  const points = Array.from({ length: STEPS + 1 }, (_, step) => {
    const t = (2 * Math.PI * step) / STEPS;
    const swell = ring.s === 0 ? 1 : 0.72 + 0.28 * Math.cos(ring.s * t + ring.u);
    const wobble = ring.k < 6 && ring.s !== 0 ? 0.5 * Math.sin(ring.s * t) : 0;
    const r =
      radius *
      (ring.m + ring.e * Math.cos(ring.s * t + ring.u) + ring.a * swell * Math.cos(ring.k * t + p + wobble));
    return `${(r * Math.cos(t)).toFixed(2)} ${(r * Math.sin(t)).toFixed(2)}`;
  });
  return `M${points.join('L')}Z`;
}
