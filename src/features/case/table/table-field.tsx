import { useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { FieldError } from '#src/components/field.tsx';
import type { FormInfo, FormParameterInfo } from '#shared/contracts/forms.ts';
import { isOriginal, isPoints } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { PotentialPreview } from '#src/components/potential-preview.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { usePotential } from '../editing/use-potential.ts';
import { problemAt } from '../model/problems.ts';
import { setForm } from '../model/terms.ts';
import { termValueText } from '../model/words.ts';
import { without } from '../model/without.ts';
import { TableDialog } from './table-dialog.tsx';
import type { Source } from './use-table-reading.ts';

const TYPED = 'pasted rows';

/** The text the rows came from, or the rows written out where it was not kept. */
function sourceOf(term: InteractionTerm): Source {
  const { original, points } = term;
  if (isOriginal(original)) return original;
  if (!isPoints(points)) return { name: TYPED, text: '' };
  return { name: TYPED, text: points.map((row) => row.join('\t')).join('\n') };
}

function wordsOf(term: InteractionTerm): string {
  const { original, points, lengthUnit } = term;
  const unit = typeof lengthUnit === 'string' ? ` ${lengthUnit}` : '';
  const from = isOriginal(original) ? `, from ${original.name}` : '';
  return `${termValueText(points)}${isPoints(points) && points.length > 0 ? unit : ''}${from}`;
}

interface TableFieldProps {
  term: InteractionTerm;
  index: number;
  form: FormInfo;
  parameter: FormParameterInfo;
}

/** The rows of a table: what they are, how they look, and the dialog that reads others. */
export function TableField({ term, index, form, parameter }: TableFieldProps) {
  const { edit, readOnly, problems } = useEditing();
  const [open, setOpen] = useState(false);
  const pointer = `/interaction/terms/${index}/${parameter.key}`;
  const fault = problemAt(problems, pointer);
  const tails = form.parameters.find(({ key }) => key === 'tail')?.choices ?? [];
  return (
    <div className="flex flex-col gap-1.5">
      <p className="text-sm text-muted">
        {parameter.label}: <span className="text-ink">{wordsOf(term)}</span>
      </p>
      {fault && <FieldError>{fault}</FieldError>}
      <TablePotential term={term} />
      {!readOnly && (
        <Button size="small" className="self-start" onClick={() => setOpen(true)}>
          Read or change the table …
        </Button>
      )}
      {open && (
        <TableDialog
          term={term}
          initial={sourceOf(term)}
          tails={tails}
          onClose={() => setOpen(false)}
          onTake={(members) => {
            setOpen(false);
            edit(`${pointer} table`, (draft) =>
              setForm(draft, index, {
                ...without(term, 'original'),
                ...members,
                form: term.form,
              }),
            );
          }}
        />
      )}
    </div>
  );
}

function TablePotential({ term }: { term: InteractionTerm }) {
  const { lengthUnit, energyUnit, points } = term;
  const units = {
    ...(typeof lengthUnit === 'string' && { length: lengthUnit }),
    ...(typeof energyUnit === 'string' && { energy: energyUnit }),
  };
  const { potential, stale } = usePotential(term, units);
  return (
    <PotentialPreview
      potential={potential}
      rows={isPoints(points) ? points : []}
      dimmed={stale}
      name="Spline through the rows and its tail"
    />
  );
}
