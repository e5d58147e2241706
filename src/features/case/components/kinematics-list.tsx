import { Figure } from '#src/components/figure.tsx';
import type { Estimate } from '#shared/contracts/estimates.ts';

/** The motion in numbers: what every law on this page is fed with. */
export function KinematicsList({ estimate }: { estimate: Estimate }) {
  const { k, wavelength, speed, reducedMass, energyCm } = estimate.kinematics;
  const rows = [
    { name: 'Wavenumber k, cm', quantity: k },
    { name: 'Wavelength λ, cm', quantity: wavelength },
    { name: 'Speed, lab', quantity: speed },
    { name: 'Reduced mass', quantity: reducedMass },
    { name: 'Energy, cm', quantity: energyCm },
  ];
  return (
    <dl className="mt-3 border-t border-line pt-2 text-sm">
      {rows.map(({ name, quantity }) => (
        <div key={name} className="flex items-baseline justify-between gap-3 py-0.5">
          <dt className="text-muted">{name}</dt>
          <dd>
            <Figure value={quantity.value} unit={quantity.unit} label={name} digits={6} />
          </dd>
        </div>
      ))}
    </dl>
  );
}
