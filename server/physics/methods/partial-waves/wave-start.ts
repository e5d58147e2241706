import type { RadialPanels } from '#server/physics/numerics/radial-panels.ts';
import { SPIN_RE } from './interaction.ts';

/** Half the exponent by which what is forgotten must die out: exp(-40) is below 1e-17. */
const FORGOTTEN = 20;

/** Exponent of what a free wave of order l gains from x to its turning point. */
export function barrierExponent(l: number, x: number): number {
  const nu = l + 0.5;
  if (nu <= x) return 0;
  const root = Math.sqrt((nu - x) * (nu + x));
  return nu * Math.log((nu + root) / x) - root;
}

/** Where the waves of one interaction begin: behind a centrifugal barrier nothing further in can be felt. */
export class WaveStart {
  private first = 0;

  /** @param charge of the Coulomb tail: with one, nothing is said of the barrier beyond the panels */
  constructor(
    private readonly panels: RadialPanels,
    private readonly k: number,
    private readonly charge: number,
  ) {}

  /** Largest of r² (k² - U) on a panel, which l(l+1) must exceed to keep the wave out. */
  private allowedOn(panel: number, factor: number): number {
    const { allowed, size } = this.panels;
    return (allowed[panel] ?? 0) + Math.abs(factor) * (size[SPIN_RE]?.[panel] ?? 0);
  }

  /** Whether what lies inside the edge cannot be felt by this wave outside. */
  private isForgotten(edge: number, l: number, factor: number): boolean {
    const { edges, count } = this.panels;
    const barrier = l * (l + 1);
    let exponent = 0;
    for (let p = edge; p < count; p++) {
      const room = barrier - this.allowedOn(p, factor);
      if (room <= 0) return exponent >= FORGOTTEN;
      exponent += Math.sqrt(room) * Math.log((edges[p + 1] ?? 1) / (edges[p] ?? 1));
      if (exponent >= FORGOTTEN) return true;
    }
    const x = this.k * (edges[count] ?? 0);
    return exponent + (this.charge === 0 ? barrierExponent(l, x) : 0) >= FORGOTTEN;
  }

  /** First panel of a wave; the count of panels where nothing is felt at all. Higher waves begin further out. */
  at(l: number, factor: number): number {
    const { count } = this.panels;
    const barrier = l * (l + 1);
    while (
      this.first < count &&
      l > 0 &&
      barrier > this.allowedOn(this.first, factor) &&
      this.isForgotten(this.first + 1, l, factor)
    ) {
      this.first += 1;
    }
    return this.first;
  }

  /** Highest l for which attraction opens a region inside its centrifugal barrier: resonances may lie up to it. */
  pocketOrder(): number {
    const { count, size, allowed } = this.panels;
    let most = 0;
    for (let p = 0; p < count; p++) {
      const open = allowed[p] ?? 0;
      if ((size[0]?.[p] ?? 0) > 0.1 * open) most = Math.max(most, open);
    }
    return Math.sqrt(most);
  }
}
