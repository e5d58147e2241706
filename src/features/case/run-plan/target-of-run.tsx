import { Segmented } from '#src/components/segmented.tsx';
import type { FoilSent, GasSent, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { isArealMassUnit } from '#shared/units/vocabulary.ts';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import type { Draft } from '../model/editor.ts';
import { without } from '../model/without.ts';
import { IsotopesField } from './isotopes-field.tsx';
import { putIn, withPlan } from './model/plan.ts';
import { withoutTexts } from './model/texts.ts';
import { TextOfPlan } from './text-of-plan.tsx';

const Q = (value: number, unit: string) => ({ value, unit });
type Kind = 'areal' | 'slab' | 'gas';

const STARTS: Record<Kind, Pick<RunPlanBody, 'foil' | 'gas'>> = {
  areal: { foil: { arealDensity: Q(1e17, '1/cm2') } },
  slab: { foil: { formula: 'C', density: Q(2, 'g/cm3'), thickness: Q(100, 'nm') } },
  gas: {
    gas: {
      formula: 'He',
      pressure: Q(1, 'mbar'),
      temperature: Q(293.15, 'K'),
      length: Q(10, 'mm'),
    },
  },
};

function Slab({ foil }: { foil: FoilSent }) {
  return (
    <>
      <TextOfPlan
        pointer="/runPlan/foil/formula"
        label="Formula"
        value={foil.formula}
        put={putIn('foil', 'formula')}
        hint="As chemists write it: C, Au, CH2, SiO2."
      />
      <QuantityField
        pointer="/runPlan/foil/density"
        label="Density"
        name="the density"
        dimension="density"
        value={foil.density}
        fallbackUnit="g/cm3"
        put={putIn('foil', 'density')}
      />
      <QuantityField
        pointer="/runPlan/foil/thickness"
        label="Thickness"
        name="the thickness"
        dimension="length"
        value={foil.thickness}
        fallbackUnit="nm"
        put={putIn('foil', 'thickness')}
      />
    </>
  );
}

function Areal({ foil }: { foil: FoilSent }) {
  const byMass = foil.arealDensity !== undefined && isArealMassUnit(foil.arealDensity.unit);
  return (
    <>
      <QuantityField
        pointer="/runPlan/foil/arealDensity"
        label="Areal density"
        name="the areal density"
        dimension="arealDensity"
        value={foil.arealDensity}
        fallbackUnit="1/cm2"
        put={putIn('foil', 'arealDensity')}
        hint={
          byMass
            ? 'By mass: the formula says how many nuclei that are.'
            : 'Of scatterers, along the normal of the foil.'
        }
      />
      <TextOfPlan
        optional={!byMass}
        pointer="/runPlan/foil/formula"
        label="Formula"
        value={foil.formula}
        put={putIn('foil', 'formula')}
        hint={
          byMass
            ? 'Such as C, Au, CH2.'
            : 'May be empty; names the matter, so that its loss and other elements are known.'
        }
      />
    </>
  );
}

function Gas({ gas }: { gas: GasSent }) {
  return (
    <>
      <TextOfPlan
        pointer="/runPlan/gas/formula"
        label="Formula"
        value={gas.formula}
        put={putIn('gas', 'formula')}
        hint="Molecules as they are: H2, He, CH4."
      />
      <QuantityField
        pointer="/runPlan/gas/pressure"
        label="Pressure"
        name="the pressure"
        dimension="pressure"
        value={gas.pressure}
        fallbackUnit="mbar"
        put={putIn('gas', 'pressure')}
      />
      <QuantityField
        pointer="/runPlan/gas/temperature"
        label="Temperature"
        name="the temperature"
        dimension="temperature"
        value={gas.temperature}
        fallbackUnit="K"
        put={putIn('gas', 'temperature')}
      />
      <QuantityField
        pointer="/runPlan/gas/length"
        label="Length along the beam"
        name="the length"
        dimension="length"
        value={gas.length}
        fallbackUnit="mm"
        put={putIn('gas', 'length')}
      />
    </>
  );
}

/** Another kind of target. Texts of the old one belong to no field any more. */
function withTarget(draft: Draft, kind: Kind): Draft {
  const clean = withoutTexts(draft, /^\/runPlan\/(foil|gas)(\/|$)/);
  const document = withPlan(clean.document, (plan) => ({
    ...without(plan, 'foil', 'gas'),
    ...STARTS[kind],
  }));
  return { ...clean, document };
}

/** Target of the run: how many nuclei stand in the way. */
export function TargetOfRun({ plan }: { plan: RunPlanBody }) {
  const { edit, readOnly } = useEditing();
  const { foil, gas } = plan;
  const kind: Kind = gas ? 'gas' : foil?.arealDensity ? 'areal' : 'slab';
  return (
    <div className="flex flex-col gap-3">
      <div>
        <Segmented
          label="How the target is given"
          value={kind}
          choices={[
            { value: 'areal', label: 'areal density' },
            { value: 'slab', label: 'foil' },
            { value: 'gas', label: 'gas' },
          ]}
          onChange={(next) =>
            !readOnly && edit(`/runPlan/target ${next}`, (before) => withTarget(before, next))
          }
        />
      </div>
      <div className="grid items-start gap-3 @[21rem]:grid-cols-2">
        {gas ? (
          <Gas gas={gas} />
        ) : kind === 'slab' ? (
          <Slab foil={foil ?? {}} />
        ) : (
          <Areal foil={foil ?? {}} />
        )}
        {foil && (
          <NumberField
            optional
            pointer="/runPlan/foil/tilt"
            label="Tilt"
            suffix="°"
            value={foil.tilt}
            rules={{ minimum: -89.99, maximum: 89.99, what: 'The tilt' }}
            put={putIn('foil', 'tilt')}
            hint="Normal of the foil to the beam."
          />
        )}
        {(kind !== 'areal' || foil?.formula !== undefined) && (
          <TextOfPlan
            pointer={gas ? '/runPlan/gas/scatterer' : '/runPlan/foil/scatterer'}
            optional
            label="Scatterer"
            value={gas ? gas.scatterer : foil?.scatterer}
            put={putIn(gas ? 'gas' : 'foil', 'scatterer')}
            hint="The element of the formula that the case is about; empty where it is clear."
          />
        )}
        {(gas ?? foil)?.formula !== undefined && (
          <IsotopesField part={gas ? 'gas' : 'foil'} value={(gas ?? foil)?.isotopes} />
        )}
      </div>
    </div>
  );
}
