import { Segmented } from '#src/components/segmented.tsx';
import type { BeamSent } from '#shared/contracts/run-plans.ts';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { takeValue } from '../model/typing.ts';
import { putIn, withPlan } from './model/plan.ts';

function Particles({ beam }: { beam: BeamSent }) {
  const { particlesPerSecond: rate } = beam;
  return (
    <NumberField
      pointer="/runPlan/beam/particlesPerSecond"
      label="Particles on target"
      suffix="/s"
      value={typeof rate === 'number' ? rate : rate?.value}
      rules={{ minimum: 0, exclusiveMinimum: true, what: 'The beam rate' }}
      put={putIn('beam', 'particlesPerSecond')}
      hint="Mean rate of beam particles."
    />
  );
}

function Current({ beam }: { beam: BeamSent }) {
  return (
    <div className="grid grid-cols-2 gap-3">
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

/** Beam of the run: how many particles, how they come. */
export function BeamOfRun({ beam }: { beam: BeamSent }) {
  const { edit, readOnly } = useEditing();
  const electric = beam.particlesPerSecond === undefined;
  const choose = (kind: 'current' | 'particles') =>
    edit('/runPlan/beam', (before) =>
      takeValue(before, '/runPlan/beam/current', (document) =>
        withPlan(document, (plan) => {
          const { dutyFactor, energySpread } = plan.beam;
          const kept = {
            ...(dutyFactor !== undefined && { dutyFactor }),
            ...(energySpread && { energySpread }),
          };
          const given =
            kind === 'current'
              ? { current: { value: 1, unit: 'nA' }, chargeState: 1 }
              : { particlesPerSecond: 1e6 };
          return { ...plan, beam: { ...kept, ...given } };
        }),
      ),
    );
  return (
    <div className="flex flex-col gap-3">
      <Segmented
        label="How the beam is given"
        value={electric ? 'current' : 'particles'}
        choices={[
          { value: 'current', label: 'electric current' },
          { value: 'particles', label: 'particle rate' },
        ]}
        onChange={(kind) => !readOnly && choose(kind)}
      />
      {electric ? <Current beam={beam} /> : <Particles beam={beam} />}
      <div className="grid grid-cols-2 gap-3">
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
