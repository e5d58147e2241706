import { useParams } from 'react-router-dom';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useAidsState } from './aids-context.ts';
import { BetweenAngles } from './between-angles.tsx';
import { Disclosure } from './disclosure.tsx';
import { InMaterial } from './in-material.tsx';
import { KinematicsTable } from './kinematics-table.tsx';
import { Limits } from './limits.tsx';
import { MixUps } from './mix-ups.tsx';
import { TakeAlong } from './take-along.tsx';

/** The figures of a version are those it was saved with; its aids are not saved. */
function ComputedNow({ estimate }: { estimate: Estimate }) {
  const { n } = useParams();
  if (n === undefined) return null;
  const { name, version } = estimate.engine;
  return (
    <p className="max-w-prose py-2 text-sm text-muted">
      The figures of version {n} are those {name} {version} gave when it was saved. What is opened
      here, and a ratio on the plot, is computed now from its inputs, by the engine and the tables
      of today: where an engine of another version differs, the saved figures are those on record.
    </p>
  );
}

/** What helps to read the curve and to take it along: closed lines below it, each asked for when it is opened. */
export function AidsArea({ estimate, fileName }: { estimate: Estimate; fileName: string }) {
  const { draft } = useEditing();
  const { projectile } = draft.document;
  const neutrons = 'species' in projectile && projectile.species === 'neutron';
  const { setMarking } = useAidsState();
  return (
    <section
      aria-label="Aids"
      className="rounded border border-line bg-sheet px-4.5 py-2"
      data-screen-only
    >
      <h2 className="sr-only">Aids</h2>
      <ComputedNow estimate={estimate} />
      <Disclosure
        title="Between two angles"
        says="what scatters into a ring, marked on the plot"
        onOpen={setMarking}
      >
        <BetweenAngles />
      </Disclosure>
      <Disclosure title="Kinematics" says="recoil angle and both energies at every angle">
        <KinematicsTable fileName={fileName} />
      </Disclosure>
      <Disclosure
        title="In a material"
        says={
          neutrons
            ? 'mean free path, scattering length density, transmission'
            : 'mean free path between collisions'
        }
      >
        <InMaterial estimate={estimate} />
      </Disclosure>
      <Disclosure
        title="Another source’s value"
        says="which usual slip would explain the difference"
      >
        <MixUps estimate={estimate} />
      </Disclosure>
      <Disclosure title="Limits" says="the case against the forms it must take in its limits">
        <Limits estimate={estimate} />
      </Disclosure>
      <Disclosure title="Take it along" says="an address, Python, LaTeX">
        <TakeAlong estimate={estimate} />
      </Disclosure>
    </section>
  );
}
