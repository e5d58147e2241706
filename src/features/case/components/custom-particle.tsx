import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { NumberField, QuantityField } from './typed-fields.tsx';

interface CustomValues {
  mass: Quantity;
  charge: number;
  spin: number;
}

interface CustomParticleProps {
  /** /projectile or /target. */
  pointer: string;
  value: CustomValues;
  put: (document: CaseDocument, value: Partial<CustomValues>) => CaseDocument;
}

/** Mass, charge and spin of a particle no table knows. */
export function CustomParticle({ pointer, value, put }: CustomParticleProps) {
  const of = pointer === '/projectile' ? 'the projectile' : 'the target';
  return (
    <>
      <QuantityField
        pointer={`${pointer}/mass`}
        label="Mass"
        name={`the mass of ${of}`}
        dimension="mass"
        value={value.mass}
        fallbackUnit="u"
        rules={{ minimum: 0, exclusiveMinimum: true, what: 'The mass', unit: value.mass.unit }}
        put={(document, mass) => (mass ? put(document, { mass }) : document)}
      />
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          pointer={`${pointer}/charge`}
          label="Charge (e)"
          value={value.charge}
          rules={{ integer: true, minimum: -200, maximum: 200, what: 'The charge' }}
          put={(document, charge) => (charge === undefined ? document : put(document, { charge }))}
        />
        <NumberField
          pointer={`${pointer}/spin`}
          label="Spin (ħ)"
          value={value.spin}
          rules={{ halves: true, minimum: 0, maximum: 20, what: 'The spin' }}
          put={(document, spin) => (spin === undefined ? document : put(document, { spin }))}
        />
      </div>
    </>
  );
}
