import { Segmented } from '#src/components/segmented.tsx';
import type { BeamSent } from '#shared/contracts/run-plans.ts';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { chargeNumberOf } from '../aids/model/charge-numbers.ts';
import type { Draft } from '../model/editor.ts';
import { without } from '../model/without.ts';
import { putIn, startBeam, withPlan } from './model/plan.ts';
import { withoutTexts } from './model/texts.ts';

type Kind = 'current' | 'particles';

function Particles({ beam }: { beam: BeamSent }) {
  const { particlesPerSecond: rate } = beam;
  return (
    <NumberField
      pointer="/runPlan/beam/particlesPerSecond"
      label="Particles on target"
      suffix="s⁻¹"
      value={typeof rate === 'number' ? rate : rate?.value}
      rules={{ minimum: 0, exclusiveMinimum: true, what: 'The beam rate' }}
      put={putIn('beam', 'particlesPerSecond')}
      hint="Mean rate of beam particles."
    />
  );
}

function Current({ beam }: { beam: BeamSent }) {
  return (
    <div className="grid items-start gap-3 @xs:grid-cols-2">
      <QuantityField
        pointer="/runPlan/beam/current"
        label="Electric current"
        name="the current"
        dimension="current"
        value={beam.current}
        fallbackUnit="nA"
        rules={{ minimum: 0, exclusiveMinimum: true, what: 'The current', unit: 'A' }}
        put={putIn('beam', 'current')}
      />
      <NumberField
        pointer="/runPlan/beam/chargeState"
        label="Charge state"
        value={beam.chargeState}
        rules={{ integer: true, minimum: -120, maximum: 120, what: 'The charge state' }}
        put={putIn('beam', 'chargeState')}
        hint="Charges per particle: 1 nA of He²⁺ is half as many as of He⁺."
      />
    </div>
  );
}

/** Another kind of beam; what both kinds have is kept. */
function withBeam(draft: Draft, kind: Kind): Draft {
  const clean = withoutTexts(draft, /^\/runPlan\/beam\/(current|chargeState|particlesPerSecond)$/);
  const document = withPlan(clean.document, (plan) => ({
    ...plan,
    beam: {
      ...without(plan.beam, 'current', 'chargeState', 'particlesPerSecond'),
      ...startBeam(clean.document, kind),
    },
  }));
  return { ...clean, document };
}

/** Beam of the run: how many particles, how they come. */
export function BeamOfRun({ beam }: { beam: BeamSent }) {
  const { draft, edit, readOnly } = useEditing();
  const electric = beam.particlesPerSecond === undefined;
  const neutral = chargeNumberOf(draft.document.projectile) === 0;
  return (
    <div className="flex flex-col gap-3">
      {neutral && !electric ? (
        <p className="text-sm text-muted">
          The projectile carries no charge: its beam is given as a rate.
        </p>
      ) : (
        <div>
          <Segmented
            label="How the beam is given"
            value={electric ? 'current' : 'particles'}
            choices={[
              { value: 'current', label: 'electric current' },
              { value: 'particles', label: 'particle rate' },
            ]}
            onChange={(kind) =>
              !readOnly && edit(`/runPlan/beam ${kind}`, (before) => withBeam(before, kind))
            }
          />
        </div>
      )}
      {electric ? <Current beam={beam} /> : <Particles beam={beam} />}
      <div className="grid items-start gap-3 @xs:grid-cols-2">
        <NumberField
          optional
          pointer="/runPlan/beam/dutyFactor"
          label="Duty factor"
          value={beam.dutyFactor}
          rules={{ minimum: 0, exclusiveMinimum: true, maximum: 1, what: 'The duty factor' }}
          put={putIn('beam', 'dutyFactor')}
          hint="Fraction of the time the beam is on."
        />
        <QuantityField
          optional
          pointer="/runPlan/beam/energySpread"
          label="Energy spread"
          name="the energy spread"
          dimension="energy"
          value={beam.energySpread}
          fallbackUnit="keV"
          rules={{ minimum: 0, what: 'The energy spread', unit: 'eV' }}
          put={putIn('beam', 'energySpread')}
          hint="Standard deviation."
        />
      </div>
    </div>
  );
}
