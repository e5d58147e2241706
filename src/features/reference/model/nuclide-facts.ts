import type { Measured, NuclideDetail } from '#shared/contracts/reference.ts';
import { withBrackets } from '#shared/units/brackets.ts';
import { unitSymbol } from '#shared/units/format.ts';
import type { Fact } from '../components/facts.tsx';
import { percentText, spinText } from './words.ts';

function text({ value, unit, uncertainty }: Measured): string {
  return `${withBrackets(value, uncertainty)} ${unitSymbol(unit)}`;
}

function optional(name: string, value: Measured | null): Fact[] {
  return value === null ? [] : [{ name, value: text(value) }];
}

export function massFacts(detail: NuclideDetail): Fact[] {
  const { atomicNumber, massNumber, atomicMass, nuclearMass, abundance, spin, species } = detail;
  return [
    { name: 'Protons, neutrons', value: `${atomicNumber}, ${massNumber - atomicNumber}` },
    { name: 'Atomic mass', value: text(atomicMass), remark: 'met by a neutral projectile' },
    {
      name: 'Nucleus, mc²',
      value: text(nuclearMass),
      remark: 'met by a charged projectile; electrons taken off',
    },
    { name: 'Spin', value: spin === null ? 'unknown to the table' : `${spinText(spin)} ħ` },
    { name: 'In nature', value: abundance === null ? 'does not occur' : percentText(abundance) },
    ...(species === null ? [] : [{ name: 'As a particle', value: species }]),
  ];
}

export function chargeFacts({ charge }: NuclideDetail): Fact[] {
  if (charge === null) return [];
  const { rms, rmsSource, fermi } = charge;
  return [
    { name: 'rms charge radius', value: text(rms), remark: rmsSource },
    ...(fermi === null
      ? []
      : [
          {
            name: 'Half-density radius c',
            value: text(fermi.c),
            remark: 'two-parameter Fermi shape',
          },
          {
            name: 'Diffuseness a',
            value: text(fermi.a),
            remark:
              fermi.origin === 'memory'
                ? 'from memory; its rms radius agrees with an independent one'
                : `checked against ${fermi.check}`,
          },
        ]),
  ];
}

export function neutronFacts({ neutron }: NuclideDetail): Fact[] {
  if (neutron === null) return [];
  return [
    ...optional('b, bound coherent', neutron.b),
    ...optional('−b″', neutron.imaginary),
    ...optional('σ coherent', neutron.sigmaCoherent),
    ...optional('σ incoherent', neutron.sigmaIncoherent),
    ...optional('σ absorbed, 1.798 Å', neutron.sigmaAbsorption),
  ];
}
