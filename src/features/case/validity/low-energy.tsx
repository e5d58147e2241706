import { Figure } from '#src/components/figure.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { Computed } from './model/methods.ts';
import { brief } from '../model/verdict.ts';
import { Panel } from './panel.tsx';

type LowEnergyAnswer = NonNullable<Computed['lowEnergy']>;
type Length = LowEnergyAnswer['scatteringLength'];

function LengthCell({ name, says, length }: { name: string; says: string; length: Length }) {
  return (
    <div className="bg-sheet px-4 py-2.5">
      <dt className="text-sm text-muted">{name}</dt>
      <dd>
        {length === null ? (
          <span className="block text-lg font-semibold">none</span>
        ) : (
          <Figure label={name} value={length.value} unit={length.unit} size="large" digits={5} />
        )}
        <span className="block text-xs text-muted">
          {length === null
            ? 'see the remark'
            : `numerics ±${brief(length.absoluteError)} · ${says}`}
        </span>
      </dd>
    </div>
  );
}

/** What is left of the potential as the energy goes to zero. */
export function LowEnergy({ answer }: { answer: LowEnergyAnswer }) {
  const { scatteringLength, effectiveRange, boundStates, remark } = answer;
  return (
    <Panel
      title="As the energy goes to zero"
      says="From the exact s wave of this potential, with the masses of this case."
    >
      <dl className="grid gap-px overflow-clip rounded border border-line bg-line @lg:grid-cols-3">
        <LengthCell name="Scattering length a" says="f tends to −a" length={scatteringLength} />
        <LengthCell
          name="Effective range r₀"
          says="k cot δ = −1/a + r₀k²/2"
          length={effectiveRange}
        />
        <div className="bg-sheet px-4 py-2.5">
          <dt className="text-sm text-muted">Bound states, l = 0</dt>
          <dd>
            <span className="block font-mono text-xl font-medium">
              {boundStates === null ? '—' : boundStates}
            </span>
            <span className="block text-xs text-muted">
              {boundStates === null ? 'not counted here' : 'nodes of the wave at zero energy'}
            </span>
          </dd>
        </div>
      </dl>
      {remark !== null && (
        <Notice tone="info" className="mt-3">
          {remark}
        </Notice>
      )}
    </Panel>
  );
}
