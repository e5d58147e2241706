import type { ReactNode } from 'react';
import type { DetectorSent, RunPlanBody } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { typedForm as exactly } from '../model/typing.ts';
import { METHOD_NAMES } from '../model/words.ts';
import { INPUT_NAMES } from './model/words.ts';
import { isotopesText } from './model/isotopes.ts';
import { percentText } from './model/numbers.ts';

type Line = [string, ReactNode];
const said = (name: string, text: ReactNode): Line[] => (text === undefined ? [] : [[name, text]]);
const quantity = (name: string, q: Quantity | undefined): Line[] => said(name, q && exactly(q));

function linesOf(plan: RunPlanBody): Line[] {
  const { beam, foil, gas, aim, uncertainties = {} } = plan;
  const rate = beam.particlesPerSecond;
  const matter = foil ?? gas;
  return [
    ...said('Cross section by', plan.method && METHOD_NAMES[plan.method]),
    ...quantity('Electric current', beam.current),
    ...said('Charge state', beam.chargeState),
    ...said('Particles on target', typeof rate === 'number' ? `${rate} s⁻¹` : undefined),
    ...quantity('Particles on target', typeof rate === 'object' ? rate : undefined),
    ...said('Duty factor', beam.dutyFactor),
    ...quantity('Energy spread (standard deviation)', beam.energySpread),
    ...said('Target', matter?.formula),
    ...quantity('Areal density', foil?.arealDensity),
    ...quantity('Density', foil?.density),
    ...quantity('Thickness', foil?.thickness),
    ...said('Tilt', foil?.tilt === undefined ? undefined : `${foil.tilt}°`),
    ...quantity('Pressure', gas?.pressure),
    ...quantity('Temperature', gas?.temperature),
    ...quantity('Length', gas?.length),
    ...said('Scatterer', matter?.scatterer),
    ...said('Isotopes', matter?.isotopes && isotopesText(matter.isotopes)),
    ...said('Other elements counted', plan.contributions?.map((one) => one.scatterer).join(', ')),
    ...said(
      'Precision aimed at',
      aim?.relativePrecision === undefined ? undefined : percentText(aim.relativePrecision),
    ),
    ...quantity('Beam time', aim?.beamTime),
    ...quantity('Set-up at each position', aim?.setupTime),
    ...quantity('Shift', aim?.shift),
    ...Object.entries(INPUT_NAMES).flatMap(([input, name]) => {
      const value = uncertainties[input as keyof typeof INPUT_NAMES];
      if (value === undefined) return [];
      return said(`Uncertainty, ${name}`, input === 'angle' ? `${value}°` : percentText(value));
    }),
    ...said('Monitor', plan.monitor),
  ];
}

function detectorText(one: DetectorSent): string {
  const parts = [
    `${one.angle}°`,
    one.distance && `at ${exactly(one.distance)}`,
    one.apertureRadius && `radius ${exactly(one.apertureRadius)}`,
    one.innerRadius && `hole ${exactly(one.innerRadius)}`,
    one.width && `width ${exactly(one.width)}`,
    one.height && `height ${exactly(one.height)}`,
    one.solidAngle === undefined ? undefined : `${one.solidAngle} sr`,
    one.efficiency === undefined ? undefined : `efficiency ${one.efficiency}`,
    one.deadTime && `dead time ${exactly(one.deadTime)}`,
    one.backgroundRate && `background ${exactly(one.backgroundRate)}`,
    one.beamBackgroundRate && `background of the beam ${exactly(one.beamBackgroundRate)}`,
  ];
  return parts.filter((part) => part !== undefined).join(', ');
}

/** On paper the inputs of the run stand as words instead of fields. */
export function PlanInWords({ plan }: { plan: RunPlanBody }) {
  const lines: Line[] = [
    ...linesOf(plan),
    ...plan.detectors.map((one): Line => [`Detector ${one.name}`, detectorText(one)]),
  ];
  return (
    <section aria-label="Run in words" className="hidden print:block">
      <h2 className="mb-1 font-bold">The run</h2>
      <dl className="grid grid-cols-[auto_1fr] gap-x-6 text-sm">
        {lines.map(([name, text]) => (
          <div key={name} className="contents">
            <dt className="text-muted">{name}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
