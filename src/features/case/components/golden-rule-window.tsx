import { Figure } from '#src/components/figure.tsx';
import type { GoldenRule } from '#shared/contracts/estimates.ts';
import { Formula } from '#src/components/formula.tsx';

/** For how long the perturbation may act: the two conditions of the golden rule in numbers. */
export function Window({ rule }: { rule: GoldenRule }) {
  const { window } = rule;
  return (
    <section
      aria-label="Validity in time"
      className="rounded border border-line bg-sheet px-4.5 py-4"
    >
      <h2 className="font-bold">For which times the rule holds</h2>
      {'none' in window ? (
        <p className="mt-1">There is no such time for this box: {window.none}</p>
      ) : (
        <p className="mt-2 flex flex-wrap items-baseline gap-x-3 gap-y-1">
          <Figure value={window.t0Min.value} unit={window.t0Min.unit} label="Shortest time" />
          <Formula tex="\le\; t_0 \;\le" />
          <Figure value={window.t0Max.value} unit={window.t0Max.unit} label="Longest time" />
        </p>
      )}
      <p className="mt-1.5 max-w-prose text-sm text-muted">
        From below: |V<sub>fi</sub>|²ρ may vary by at most 10 % over ±2πħ/t₀ about the final energy.
        From above: the probability of any transition, w<sub>tot</sub>t₀, stays below 0.1. The upper
        end grows with the volume of the box.
      </p>
    </section>
  );
}
