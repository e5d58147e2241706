import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { resolvePanels } from '#server/physics/numerics/resolved-panels.ts';
import type { LocalPotential, Shell } from '../local-potential.ts';

/** Points of one panel with U at them, quadrature weights included; a delta shell is a panel of one point. */
export interface MeshPanel {
  r: Float64Array;
  /** w U, 1/angstrom. */
  re: Float64Array;
  im: Float64Array | null;
}

const RULE = gaussRule(16);

/**
 * Panels on which r U(r) is a polynomial, to what counts at wave number k: the waves are x² near the origin and of the size of one
 * beyond 1/k, so that r U counts with k² r, then with 1/r.
 *
 * @returns null where U cannot be followed
 */
export function potentialEdges(potential: LocalPotential, k: number): number[] | null {
  const { re, im, edges, noise } = potential;
  const weighted = [(r: number) => r * re(r), ...(im ? [(r: number) => r * im(r)] : [])];
  const found = resolvePanels(weighted, edges, {
    weight: (a, b) => Math.min(k * k * b, 1 / Math.max(a, 1 / k)),
    absoluteNoise: () => noise,
  });
  return found.resolved ? found.edges : null;
}

/** The same panels cut so that none is wider than `widest`. */
function finer(edges: readonly number[], widest: number): number[] {
  return edges.flatMap((b, i) => {
    if (i === 0) return [b];
    const a = edges[i - 1] ?? b;
    const parts = Math.max(1, Math.ceil((b - a) / widest));
    return Array.from({ length: parts }, (_, j) =>
      j === parts - 1 ? b : a + ((b - a) * (j + 1)) / parts,
    );
  });
}

function shellPanel({ R, re, im }: Shell, complex: boolean): MeshPanel {
  return {
    r: Float64Array.of(R),
    re: Float64Array.of(re),
    im: complex ? Float64Array.of(im) : null,
  };
}

/**
 * Points for the radial integrals, sixteen Gauss points a panel.
 *
 * @param edges of panels on which U is smooth; shells lie on edges
 * @param widest width of a panel, angstrom
 * @returns panels in order of r
 */
export function radialMesh(
  { re, im, shells }: LocalPotential,
  edges: readonly number[],
  widest: number,
): MeshPanel[] {
  const ends = finer(edges, widest);
  const complex = im !== null || shells.some((shell) => shell.im !== 0);
  const waiting = [...shells].sort((a, b) => a.R - b.R);
  const panels: MeshPanel[] = [];
  for (let i = 1; i < ends.length; i++) {
    const [a, b] = [ends[i - 1] ?? 0, ends[i] ?? 0];
    const half = (b - a) / 2;
    const r = RULE.nodes.map((x) => a + half + half * x);
    const sampled = (f: (r: number) => number) =>
      r.map((at, j) => half * (RULE.weights[j] ?? 0) * f(at));
    panels.push({ r, re: sampled(re), im: complex ? sampled(im ?? (() => 0)) : null });
    while (waiting[0] && waiting[0].R <= b) {
      const shell = waiting.shift();
      if (shell) panels.push(shellPanel(shell, complex));
    }
  }
  return panels;
}
