import { useEffect } from 'react';
import { Segmented } from '#src/components/segmented.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { REGIMES } from '#shared/contracts/estimates.ts';
import type { Projectile, Species } from '#shared/contracts/estimates.ts';
import { formatComposed, formatNumber } from '#shared/units/format.ts';
import { wavelengthFromEnergy } from '#shared/units/de-broglie.ts';
import { toInternal } from '#shared/units/quantity.ts';
import { UNITS } from '#shared/units/vocabulary.ts';
import { parseQuantity } from '#shared/units/parse.ts';
import { useEditing } from '../editing/editor-context.ts';
import { beamContext, dependsOnParticle, isWavelength } from '../model/beam-context.ts';
import type { Draft } from '../model/editor.ts';
import { withEntered, withoutEntered } from '../model/entered.ts';
import { takeText } from '../model/typing.ts';
import { REGIME_NAMES } from '../model/words.ts';
import { ChoiceField } from './choice-field.tsx';
import { CustomParticle } from './custom-particle.tsx';
import { NuclideField } from './nuclide-field.tsx';
import { CUSTOM, SPECIES_CHOICES } from './particle-choices.ts';
import { QuantityField } from './typed-fields.tsx';

type ParticleKind = Species | 'nuclide' | 'custom';

function kindOf(projectile: Projectile): ParticleKind {
  return 'nuclide' in projectile ? 'nuclide' : projectile.species;
}

function projectileOf(kind: ParticleKind): Projectile {
  if (kind === 'nuclide') return { nuclide: 'C-12' };
  return kind === 'custom' ? { species: 'custom', ...CUSTOM } : { species: kind };
}

/** Another particle gives a typed wavelength another energy: such a text is read anew once the particle is known. */
function withParticle(draft: Draft, change: (document: CaseDocument) => CaseDocument): Draft {
  const typed = draft.open['/energy']?.text ?? draft.document.entered?.['/energy'];
  const document = change(withoutEntered(draft.document, '/projectile'));
  const openEntries = Object.entries(draft.open).filter(([key]) => !key.startsWith('/projectile'));
  const open = Object.fromEntries(openEntries);
  if (typed === undefined || !dependsOnParticle(typed)) return { ...draft, document, open };
  return {
    ...draft,
    document: withEntered(document, '/energy', null),
    open: { ...open, '/energy': { text: typed, problem: null } },
  };
}

const putEnergy = (document: CaseDocument, energy: CaseDocument['energy'] | undefined) =>
  energy ? { ...document, energy } : document;

/** Reads a text that waited for the particle as soon as its mass is here. */
function useWaitingEnergy(): void {
  const { draft, edit, mass } = useEditing();
  const waiting = draft.open['/energy']?.problem === null;
  useEffect(() => {
    if (!waiting || mass === undefined) return;
    edit('/energy', (before) => {
      const text = before.open['/energy']?.text;
      if (text === undefined) return before;
      const context = beamContext(before.document, mass);
      const parsed = parseQuantity(text, 'energy', context);
      const reading = parsed.ok ? { value: parsed.quantity } : { problem: parsed.message };
      return takeText(before, '/energy', text, reading, putEnergy);
    });
  }, [waiting, mass, edit]);
}

function Hint() {
  const { draft, estimate, mass } = useEditing();
  if (!estimate) return null;
  const { energy, kinematics = 'nonrelativistic' } = draft.document;
  const { length } = estimate.units;
  const wavelength =
    mass === undefined
      ? null
      : wavelengthFromEnergy(toInternal(energy, 'energy'), mass, kinematics) /
        (UNITS.length[length] ?? 1);
  return (
    <>
      β = {formatNumber(estimate.kinematics.beta, 3)}
      {wavelength !== null && ` · λ = ${formatComposed(wavelength, length, 4)}`}, in the lab
    </>
  );
}

export function BeamInputs() {
  const { draft, edit, mass, readOnly } = useEditing();
  const { document } = draft;
  const { projectile } = document;
  useWaitingEnergy();
  return (
    <>
      <ChoiceField
        exact
        pointer="/projectile"
        label="Particle"
        value={kindOf(projectile)}
        choices={[
          ...SPECIES_CHOICES,
          {
            group: 'Others',
            choices: [
              { value: 'nuclide', label: 'bare nucleus …' },
              { value: 'custom', label: 'custom …' },
            ],
          },
        ]}
        onChange={(kind) =>
          edit('/projectile', (before) =>
            withParticle(before, (into) => ({ ...into, projectile: projectileOf(kind) })),
          )
        }
      />
      {'nuclide' in projectile && (
        <NuclideField
          pointer="/projectile/nuclide"
          value={projectile.nuclide}
          hint="A bare nucleus: its charge is its atomic number."
          put={(into, nuclide) => ({ ...into, projectile: { nuclide } })}
        />
      )}
      {'species' in projectile && projectile.species === 'custom' && (
        <CustomParticle
          pointer="/projectile"
          value={projectile}
          put={(into, values) => ({ ...into, projectile: { ...projectile, ...values } })}
        />
      )}
      <QuantityField
        pointer="/energy"
        label="Kinetic energy, lab"
        name="the energy"
        dimension="energy"
        value={document.energy}
        fallbackUnit="eV"
        rules={{ minimum: 0, exclusiveMinimum: true, what: 'The energy', unit: 'eV' }}
        context={beamContext(document, mass)}
        waits={(text) => mass === undefined && isWavelength(text)}
        put={putEnergy}
        hint={<Hint />}
      />
      <div className="flex flex-col items-start gap-1">
        <span className="text-sm text-muted" aria-hidden="true">
          Kinematics
        </span>
        <Segmented
          label="Kinematics"
          value={document.kinematics ?? 'nonrelativistic'}
          choices={REGIMES.map((value) => ({ value, label: REGIME_NAMES[value] }))}
          onChange={(kinematics) =>
            !readOnly &&
            edit('/kinematics', (before) =>
              withParticle(before, (into) => ({ ...into, kinematics })),
            )
          }
        />
      </div>
    </>
  );
}
