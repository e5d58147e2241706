import { describe, expect, it } from 'vitest';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import {
  NUCLEAR_CHARGES,
  NUCLEAR_CHARGE_EDITION,
  fermiRms,
  fermiShape,
  nuclearCharge,
} from '#server/physics/tables/nuclear-charge.ts';
import { NUCLIDES, nuclide } from '#server/physics/tables/nuclides.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { refusal } from './refusal.ts';

const SHAPES = NUCLEAR_CHARGES.flatMap(({ nuclide: name, rms, fermi }) =>
  fermi === null ? [] : [{ name, rms, ...fermi }],
);

describe('fermiRms', () => {
  it('is the ratio of moments by quadrature, an independent route, also where the surface fills the nucleus', () => {
    for (const [c, a] of [
      [6.38, 0.535],
      [2.58, 0.567],
      [1, 0.5],
      [1, 1],
    ] as const) {
      const moment = (power: number) =>
        integrate((r) => r ** power / (1 + Math.exp((r - c) / a)), 0, c + 60 * a, {
          breakpoints: [c - 5 * a, c, c + 5 * a, c + 20 * a],
        }).value;
      expectRelative(fermiRms(c, a), Math.sqrt(moment(4) / moment(2)), 1e-12);
    }
  });

  it('tends to the sharp sphere √(3/5) c as a goes to 0, and to 3c²/5 + 7π²a²/5 while a is small', () => {
    expectRelative(fermiRms(5, 1e-6), Math.sqrt(0.6) * 5, 1e-12);
    expectRelative(fermiRms(6.38, 0.4) ** 2, 0.6 * 6.38 ** 2 + 1.4 * (Math.PI * 0.4) ** 2, 1e-6);
  });

  it('scales with the length', () => {
    expectRelative(fermiRms(638, 53.5), 100 * fermiRms(6.38, 0.535), 1e-14);
  });

  it('gives the radii printed with the shapes of gold and lead', () => {
    // De Vries 1987: 5.33 and 5.521 fm, values from memory.
    const gold = fermiShape('Au-197');
    expectRelative(fermiRms(gold.c, gold.a), 5.3271, 1e-5);
    expect(Math.abs(fermiRms(gold.c, gold.a) - 5.33)).toBeLessThan(0.005);
    const lead = fermiShape('Pb-208');
    expectRelative(fermiRms(lead.c, lead.a), 5.5219, 1e-5);
    expect(Math.abs(fermiRms(lead.c, lead.a) - 5.521)).toBeLessThan(0.001);
  });

  it.each([
    [0, 0.5],
    [-1, 0.5],
    [1, 0],
    [1, 1.1],
    [NaN, 0.5],
    [1, NaN],
    [Infinity, 1],
  ])('refuses c = %f, a = %f', (c, a) => {
    expect(refusal(() => fermiRms(c, a))).toContain('positive diffuseness');
  });
});

describe('the table of nuclear charges', () => {
  it('holds the radii of its edition', () => {
    expect(NUCLEAR_CHARGE_EDITION).toBe('de Vries 1987, Angeli and Marinova 2013');
    // Angeli and Marinova 2013; CODATA 2022 for the proton and the alpha particle.
    expect(nuclearCharge('Au-197').rms).toBe(5.4371);
    expect(nuclearCharge('Pb-208').rms).toBe(5.5012);
    expect(nuclearCharge('C-12').rms).toBe(2.4702);
    expect(nuclearCharge('H-1')).toMatchObject({ rms: 0.84075, rmsSource: 'CODATA 2022' });
    expect(nuclearCharge('He-4').rms).toBe(1.6785);
  });

  it('has real nuclides, each once, with radii that grow as A^(1/3)', () => {
    const known = new Set(NUCLIDES.map(({ name }) => name));
    expect(new Set(NUCLEAR_CHARGES.map((entry) => entry.nuclide)).size).toBe(
      NUCLEAR_CHARGES.length,
    );
    for (const { nuclide: name, rms } of NUCLEAR_CHARGES) {
      expect(known.has(name), name).toBe(true);
      const { massNumber } = nuclide(name);
      // Johnson and Soff 1985: 0.836 A^(1/3) + 0.570 fm for A above 9; deformed neon lies 6 % above.
      if (massNumber > 9) expectRelative(rms, 0.836 * Math.cbrt(massNumber) + 0.57, 0.06);
    }
  });

  it('keeps only shapes whose rms agrees within 1 % with the radius, or with the rms printed beside them', () => {
    expect(SHAPES).toHaveLength(33);
    for (const { name, rms, c, a, check } of SHAPES) {
      const deviation = fermiRms(c, a) / rms - 1;
      if (check === 'radius of 2013') expect(Math.abs(deviation), name).toBeLessThanOrEqual(0.01);
      else expect(['Au-197', 'Pb-208'], name).toContain(name);
      // The surface is 2.0 to 2.6 fm thick from 90 to 10 % all over the chart.
      expect(4 * Math.log(3) * a, name).toBeGreaterThan(2);
      expect(4 * Math.log(3) * a, name).toBeLessThan(2.6);
    }
  });
});

describe('refusals', () => {
  it('say why a shape is not offered and what to enter', () => {
    expect(refusal(() => fermiShape('Cu-63'))).toContain('rms radius of 3.9475 fm, against 3.8823');
    expect(refusal(() => fermiShape('O-16'))).toContain('uniform sphere of rms radius 2.6991 fm');
  });

  it('offer an estimate where no radius is tabulated', () => {
    expect(refusal(() => nuclearCharge('Dy-164'))).toContain('about 5.15 fm');
    expect(refusal(() => nuclearCharge('au-197'))).toContain('write Au-197');
    expect(refusal(() => nuclearCharge('Au'))).toContain('Au-197');
  });
});
