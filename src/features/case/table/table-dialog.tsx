import { useMemo, useState } from 'react';
import { Button, buttonClasses } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Field, FieldError, TextArea } from '#src/components/field.tsx';
import { Select } from '#src/components/select.tsx';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { PotentialPreview } from '#src/components/potential-preview.tsx';
import { usePotential } from '../editing/use-potential.ts';
import { choiceName } from '../model/words.ts';
import { MOST_TEXT } from './model/read-table.ts';
import { TableControls } from './table-controls.tsx';
import { TableFindings } from './table-findings.tsx';
import type { Source, TableReading } from './use-table-reading.ts';
import { useTableReading } from './use-table-reading.ts';

interface TableDialogProps {
  /** The term as it stands; its units and tail are the starting point. */
  term: InteractionTerm;
  initial: Source;
  tails: readonly string[];
  onClose: () => void;
  onTake: (members: Omit<InteractionTerm, 'form'>) => void;
}

function FileChoice({
  onText,
  onTrouble,
}: {
  onText: (source: Source) => void;
  onTrouble: (trouble: string | null) => void;
}) {
  async function take(file: File) {
    if (file.size > MOST_TEXT) {
      onTrouble(`${file.name} is larger than ${MOST_TEXT / 1e6} MB; thin the table out first.`);
      return;
    }
    onTrouble(null);
    onText({ name: file.name.slice(0, 200), text: await file.text() });
  }
  return (
    <label
      className={`${buttonClasses('plain', 'small')} cursor-pointer self-start has-focus-visible:outline-2 has-focus-visible:outline-ink`}
    >
      Choose a file
      <input
        type="file"
        accept=".csv,.tsv,.txt,.dat,.asc,text/*"
        className="sr-only"
        onChange={(event) => {
          const [file] = event.target.files ?? [];
          if (file) {
            take(file).catch(() => onTrouble(`${file.name} could not be read.`));
          }
          event.target.value = '';
        }}
      />
    </label>
  );
}

/** Spline and tail of the rows, as the server draws them. */
function Preview({ reading, tail }: { reading: TableReading; tail: string }) {
  const { sound, lengthUnit, energyUnit, rows } = reading;
  const term = useMemo(
    () => (sound ? { form: 'tabulated', lengthUnit, energyUnit, points: rows, tail } : null),
    [sound, lengthUnit, energyUnit, rows, tail],
  );
  const { potential, stale, errors, failure } = usePotential(term, {
    length: lengthUnit,
    energy: energyUnit,
  });
  const words = failure ?? errors.map(({ message }) => message).join(' ');
  return (
    <>
      {words !== '' && <FieldError>{words}</FieldError>}
      <PotentialPreview
        potential={potential}
        rows={rows}
        dimmed={stale}
        name="Spline through the rows and its tail"
      />
    </>
  );
}

/** Reads a table of r and V from a text or a file: cut, mapped, drawn, and only then taken. */
export function TableDialog({ term, initial, tails, onClose, onTake }: TableDialogProps) {
  const reading = useTableReading(initial, term);
  const before = term['tail'];
  const [tail, setTail] = useState(typeof before === 'string' ? before : (tails[0] ?? 'zero'));
  const [trouble, setTrouble] = useState<string | null>(null);
  return (
    <Dialog
      open
      width="wide"
      title="A table of V(r)"
      description="A cubic spline goes through the rows; beyond the last one the tail you choose. Nothing changes until you take the table."
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            look="primary"
            disabled={reading.members === null}
            onClick={() => {
              if (reading.members) onTake({ ...reading.members, tail });
            }}
          >
            Take this table
          </Button>
        </>
      }
    >
      <Field label={`Rows of r and V (${reading.source.name})`} error={trouble}>
        {(control) => (
          <TextArea
            {...control}
            data-autofocus
            rows={6}
            className="font-mono text-sm"
            spellCheck={false}
            value={reading.source.text}
            onPaste={(event) => {
              const { length } = event.clipboardData.getData('text');
              const tooLong = length > MOST_TEXT;
              if (tooLong) event.preventDefault();
              setTrouble(
                tooLong
                  ? `What was pasted has ${length} characters; at most ${MOST_TEXT} are read. Thin the table out first.`
                  : null,
              );
            }}
            onChange={(event) =>
              reading.setSource({ name: reading.source.name, text: event.target.value })
            }
          />
        )}
      </Field>
      <FileChoice onText={reading.setSource} onTrouble={setTrouble} />
      <div className="grid gap-4 md:grid-cols-2">
        <div className="flex flex-col gap-3">
          <TableControls reading={reading} />
          <Field label="Beyond the last row">
            {(control) => (
              <Select
                {...control}
                value={tail}
                choices={tails.map((value) => ({ value, label: choiceName(value) ?? value }))}
                onChange={setTail}
              />
            )}
          </Field>
        </div>
        <div className="flex flex-col gap-3">
          <TableFindings reading={reading} />
          <Preview reading={reading} tail={tail} />
        </div>
      </div>
    </Dialog>
  );
}
