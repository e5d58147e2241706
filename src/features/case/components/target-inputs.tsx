import type { Species, Target } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { withoutEntered } from '../model/entered.ts';
import { ChoiceField } from './choice-field.tsx';
import { CustomParticle } from './custom-particle.tsx';
import { NuclideField } from './nuclide-field.tsx';
import { CUSTOM, SPECIES_CHOICES } from './particle-choices.ts';
import { NumberField } from './typed-fields.tsx';
import { without } from '../model/without.ts';

type Kind = Target['kind'];

function targetOf(kind: Kind): Target {
  switch (kind) {
    case 'fixed':
      return { kind, charge: 0 };
    case 'nuclide':
      return { kind, nuclide: 'C-12' };
    case 'species':
      return { kind, species: 'proton' };
    case 'custom':
      return { kind, ...CUSTOM };
  }
}

const IDENTICAL = ['rule', 'yes', 'no'] as const;

function IdenticalField() {
  const { draft, editDocument, estimate } = useEditing();
  const { identical } = draft.document;
  const now = estimate ? (estimate.identical ? 'identical' : 'not identical') : null;
  return (
    <ChoiceField
      pointer="/identical"
      label="Identical particles"
      value={identical === undefined ? 'rule' : identical ? 'yes' : 'no'}
      choices={IDENTICAL.map((value) => ({
        value,
        label: {
          rule: 'by the rule: same species or nuclide',
          yes: 'treat as identical',
          no: 'treat as distinguishable',
        }[value],
      }))}
      {...(now === null ? {} : { hint: `Beam and target here: ${now}.` })}
      onChange={(choice) =>
        editDocument('/identical', (document) =>
          choice === 'rule'
            ? without(document, 'identical')
            : { ...document, identical: choice === 'yes' },
        )
      }
    />
  );
}

export function TargetInputs() {
  const { draft, edit } = useEditing();
  const { target } = draft.document;
  const choose = (next: Target) =>
    edit('/target', (before) => ({
      ...before,
      document: { ...withoutEntered(before.document, '/target'), target: next },
      open: Object.fromEntries(
        Object.entries(before.open).filter(([key]) => !key.startsWith('/target')),
      ),
    }));
  return (
    <>
      <ChoiceField<Kind>
        exact
        pointer="/target"
        label="Kind of target"
        value={target.kind}
        choices={[
          { value: 'fixed', label: 'fixed centre (infinitely heavy)' },
          { value: 'nuclide', label: 'nuclide, recoiling' },
          { value: 'species', label: 'particle, recoiling' },
          { value: 'custom', label: 'custom, recoiling' },
        ]}
        onChange={(kind) => choose(targetOf(kind))}
      />
      {target.kind === 'fixed' && (
        <NumberField
          pointer="/target/charge"
          label="Charge of the centre (e)"
          value={target.charge}
          rules={{ integer: true, minimum: -200, maximum: 200, what: 'The charge' }}
          hint="Used by the Coulomb forms; 0 for the others."
          put={(document, charge) =>
            charge === undefined ? document : { ...document, target: { kind: 'fixed', charge } }
          }
        />
      )}
      {target.kind === 'nuclide' && (
        <NuclideField
          pointer="/target/nuclide"
          value={target.nuclide}
          put={(document, nuclide) => ({ ...document, target: { kind: 'nuclide', nuclide } })}
        />
      )}
      {target.kind === 'species' && (
        <ChoiceField<Species>
          pointer="/target/species"
          label="Particle"
          value={target.species}
          choices={SPECIES_CHOICES}
          onChange={(species) => choose({ kind: 'species', species })}
        />
      )}
      {target.kind === 'custom' && (
        <CustomParticle
          pointer="/target"
          value={target}
          put={(document, values) => ({ ...document, target: { ...target, ...values } })}
        />
      )}
      {target.kind !== 'fixed' && <IdenticalField />}
    </>
  );
}
