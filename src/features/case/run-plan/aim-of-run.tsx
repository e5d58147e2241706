import type { RunPlanBody } from '#shared/contracts/run-plans.ts';
import { UNCERTAIN_INPUTS } from '#shared/contracts/run-plans.ts';
import type { Method } from '#shared/contracts/estimates.ts';
import { METHODS } from '#shared/contracts/estimates.ts';
import { ChoiceField } from '../components/choice-field.tsx';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { without } from '../model/without.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { KindOfUncertainty } from './kind-of-uncertainty.tsx';
import { putIn, withPlan } from './model/plan.ts';
import { putUncertainty } from './model/uncertainties.ts';
import { INPUT_NAMES } from './model/words.ts';

/** What the run is to reach, and by which cross section. */
export function AimOfRun({ plan }: { plan: RunPlanBody }) {
  const { editDocument } = useEditing();
  const { aim } = plan;
  return (
    <div className="grid items-start gap-3 @xs:grid-cols-2 @2xl:grid-cols-3">
      <ChoiceField<Method>
        pointer="/runPlan/method"
        label="Cross section by"
        value={plan.method ?? 'born1'}
        choices={METHODS.map((value) => ({ value, label: METHOD_NAMES[value] }))}
        onChange={(method) =>
          editDocument('/runPlan/method', (document) =>
            withPlan(document, (before) => ({ ...before, method })),
          )
        }
      />
      <NumberField
        optional
        pointer="/runPlan/aim/relativePrecision"
        label="Precision of the counts"
        value={aim?.relativePrecision}
        rules={{ minimum: 0, exclusiveMinimum: true, maximum: 0.999, what: 'The precision' }}
        put={putIn('aim', 'relativePrecision')}
        hint="Relative, at every detector: 0.02 is 2 %."
      />
      <QuantityField
        optional
        pointer="/runPlan/aim/beamTime"
        label="Beam time there is"
        name="the beam time"
        dimension="time"
        value={aim?.beamTime}
        fallbackUnit="h"
        rules={{ minimum: 0, exclusiveMinimum: true, what: 'The beam time', unit: 's' }}
        put={putIn('aim', 'beamTime')}
        hint="Sample and blank together."
      />
      {plan.detectors.length > 1 && (
        <ChoiceField<string>
          pointer="/runPlan/monitor"
          label="Monitor"
          value={plan.monitor ?? ''}
          choices={[
            { value: '', label: 'none' },
            ...plan.detectors.map(({ name }) => ({ value: name, label: name })),
          ]}
          hint="Counts are divided by its counts: current, thickness and density cancel."
          onChange={(name) =>
            editDocument('/runPlan/monitor', (document) =>
              withPlan(document, (before) => ({
                ...without(before, 'monitor'),
                ...(name !== '' && { monitor: name }),
              })),
            )
          }
        />
      )}
    </div>
  );
}

/** Relative standard uncertainties of the inputs, and how each of them is known. */
export function UncertaintiesOfRun({ plan }: { plan: RunPlanBody }) {
  const stated = UNCERTAIN_INPUTS.filter((input) => plan.uncertainties?.[input] !== undefined);
  return (
    <details className="rounded border border-line px-3 py-2">
      <summary className="cursor-pointer text-sm font-semibold">
        Uncertainties of the inputs
        <span className="ml-2 font-normal text-muted">{stated.length} stated</span>
      </summary>
      <div className="mt-3 grid items-start gap-3 @xs:grid-cols-2 @xl:grid-cols-4">
        {UNCERTAIN_INPUTS.map((input) => (
          <NumberField
            key={input}
            optional
            pointer={`/runPlan/uncertainties/${input}`}
            label={input === 'angle' ? 'angle (absolute)' : `${INPUT_NAMES[input]} (relative)`}
            {...(input === 'angle' && { suffix: '°' })}
            value={plan.uncertainties?.[input]}
            rules={{
              minimum: 0,
              maximum: input === 'angle' ? 10 : 1,
              what: `The uncertainty of the ${INPUT_NAMES[input]}`,
            }}
            put={putUncertainty(input)}
          />
        ))}
      </div>
      {stated.map((input) => (
        <KindOfUncertainty key={input} input={input} kind={plan.uncertaintyKinds?.[input]} />
      ))}
    </details>
  );
}
