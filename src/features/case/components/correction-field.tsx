import { useId } from 'react';
import { FieldError } from '#src/components/field.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { useEditing } from '../editing/editor-context.ts';
import { problemAt } from '../model/problems.ts';
import { without } from '../model/without.ts';

const LEPTONS = ['electron', 'positron', 'muon-', 'muon+'];

/** Whether the correction may be asked for at all: the engine says whether it can be applied. */
function concerns({ projectile, kinematics, corrections = [] }: CaseDocument): boolean {
  const lepton = 'species' in projectile && LEPTONS.includes(projectile.species);
  return corrections.length > 0 || (lepton && kinematics === 'relativistic');
}

/** The correction of McKinley and Feshbach, for relativistic leptons on charges. */
export function CorrectionField() {
  const { draft, editDocument, readOnly, problems } = useEditing();
  const id = useId();
  const { document } = draft;
  if (!concerns(document)) return null;
  const asked = document.corrections?.includes('mckinleyFeshbach') ?? false;
  const fault = problemAt(problems, '/corrections');
  return (
    <div className="flex flex-col gap-1 border-t border-dashed border-edge pt-3">
      <label htmlFor={id} className="flex items-start gap-2">
        <input
          id={id}
          type="checkbox"
          className="mt-1 size-4 accent-barn"
          checked={asked}
          disabled={readOnly}
          aria-describedby={`${id}-hint`}
          {...(fault ? { 'aria-invalid': true } : {})}
          onChange={(event) => {
            const wanted = event.target.checked;
            editDocument('/corrections', (before) =>
              wanted
                ? { ...before, corrections: ['mckinleyFeshbach'] }
                : without(before, 'corrections'),
            );
          }}
        />
        Correction of McKinley and Feshbach
      </label>
      {fault && <FieldError>{fault}</FieldError>}
      <p id={`${id}-hint`} className="text-xs text-muted">
        The next order in the charge, which tells electrons from positrons; for |α Z₁Z₂| below about
        0.2.
      </p>
    </div>
  );
}
