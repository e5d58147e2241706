import type { ReactNode } from 'react';
import { Figure } from '#src/components/figure.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { MaterialAids, MeanFreePath, NeutronSample } from '#shared/contracts/material-aids.ts';
import { formatComposed, formatNumber, formatQuantity } from '#shared/units/format.ts';
import { numericsText } from '../model/verdict.ts';

function Line({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="grid gap-x-4 border-t border-line py-1.5 first:border-t-0 @lg:grid-cols-[13rem_minmax(0,1fr)]">
      <dt className="text-sm text-muted">{name}</dt>
      <dd className="min-w-0">{children}</dd>
    </div>
  );
}

const Remark = ({ children }: { children: ReactNode }) => (
  <span className="block text-xs text-muted">{children}</span>
);

function Path({ name, path }: { name: string; path: MeanFreePath }) {
  if ('divergent' in path) {
    return (
      <Line name={name}>
        <span className="font-semibold">none: the cross section diverges</span>
        <Remark>{path.reason}</Remark>
      </Line>
    );
  }
  if ('unavailable' in path) {
    return (
      <Line name={name}>
        <span className="text-sm">{path.reason}</span>
      </Line>
    );
  }
  const { value, unit, crossSection, relativeError, collisions } = path;
  return (
    <Line name={name}>
      <Figure value={value} unit={unit} label={name} />
      <Remark>
        first Born · 1/(nσ), σ = {formatComposed(crossSection.value, crossSection.unit, 4)}
        {relativeError !== undefined && ` · ${numericsText({ relativeError })}`}
        {collisions !== undefined &&
          ` · ${formatNumber(collisions, 3)} collisions in the thickness given`}
      </Remark>
    </Line>
  );
}

function Told<T extends object>({
  name,
  entry,
  children,
}: {
  name: string;
  entry: T | { unavailable: true; reason: string };
  children: (entry: T) => ReactNode;
}) {
  return (
    <Line name={name}>
      {'unavailable' in entry ? (
        <span className="text-sm">{'reason' in entry ? String(entry.reason) : ''}</span>
      ) : (
        children(entry)
      )}
    </Line>
  );
}

function Neutron({ sample }: { sample: NeutronSample }) {
  const { scatteringLengthDensity, scattering, absorption, tenPercentThickness } = sample;
  return (
    <>
      <Told name="Scattering length density" entry={scatteringLengthDensity}>
        {({ value, unit, uncertainty, criticalTransfer, criticalAngle }) => (
          <>
            <Figure value={value} unit={unit} label="Scattering length density" digits={5} />
            <Remark>
              {uncertainty !== undefined &&
                `standard uncertainty of the tabulated lengths ${formatNumber(uncertainty, 2)}`}
              {criticalTransfer &&
                criticalAngle &&
                ` · total reflection below q = ${formatQuantity(criticalTransfer, 4)}, glancing angle ${formatQuantity(criticalAngle, 4)}`}
            </Remark>
          </>
        )}
      </Told>
      <Told name="Scattering, per formula unit" entry={scattering}>
        {({ coherent, incoherent, macroscopic }) => (
          <>
            <span className="font-mono">
              {formatQuantity(coherent, 4)} + {formatQuantity(incoherent, 4)}
            </span>
            <Remark>coherent + incoherent, bound; nσ = {formatQuantity(macroscopic, 4)}</Remark>
          </>
        )}
      </Told>
      <Told name="Absorption, per formula unit" entry={absorption}>
        {(entry) => (
          <>
            <span className="font-mono">{formatQuantity(entry, 4)}</span>
            <Remark>
              at {formatQuantity(sample.wavelength, 4)} in the lab; nσ ={' '}
              {formatQuantity(entry.macroscopic, 4)}
            </Remark>
          </>
        )}
      </Told>
      <Told name="Ten-per-cent thickness" entry={tenPercentThickness}>
        {({ value, unit }) => (
          <>
            <Figure value={value} unit={unit} label="Ten-per-cent thickness" digits={3} />
            <Remark>a tenth of the beam has scattered there: −ln 0.9/(nσ)</Remark>
          </>
        )}
      </Told>
      {sample.transmission && (
        <Told name="Transmission" entry={sample.transmission}>
          {({ thickness, value, byScattering, byAbsorption }) => (
            <>
              <span className="font-mono">{formatNumber(value, 4)}</span>
              <Remark>
                through {formatQuantity(thickness, 4)}; scattering alone{' '}
                {formatNumber(byScattering, 4)}, absorption alone {formatNumber(byAbsorption, 4)}.
                What scatters once is taken as lost.
              </Remark>
            </>
          )}
        </Told>
      )}
    </>
  );
}

/** A case in a material, number by number, each with what it rests on. */
export function MaterialAnswer({ aids }: { aids: MaterialAids }) {
  const { material, scatterer, neutron } = aids;
  const atoms = material.atoms.find(({ name }) => name === scatterer);
  return (
    <div className="flex flex-col gap-2">
      <dl>
        <Line name={`Number of ${scatterer} atoms`}>
          {atoms && (
            <Figure
              value={atoms.numberDensity.value}
              unit={atoms.numberDensity.unit}
              label={`Number density of ${scatterer}`}
              digits={5}
            />
          )}
          <Remark>{material.source}</Remark>
        </Line>
        <Path name="Mean free path" path={aids.meanFreePath} />
        {aids.between && <Path name="Between the marked angles" path={aids.between} />}
        {neutron && !('unavailable' in neutron) && <Neutron sample={neutron} />}
      </dl>
      {neutron &&
        ('unavailable' in neutron ? (
          <p className="text-sm">{neutron.reason}</p>
        ) : (
          <p className="text-xs text-muted">Neutron numbers: {neutron.edition}.</p>
        ))}
      {aids.warnings.map(({ code, message, level }) =>
        level === 'info' ? (
          <p key={code} className="text-sm text-muted">
            {message}
          </p>
        ) : (
          <Notice key={code} tone="attention">
            {message}
          </Notice>
        ),
      )}
    </div>
  );
}
