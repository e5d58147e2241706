import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { InteractionContent } from '#shared/contracts/library.ts';
import { formsQuery } from '#src/lib/forms.ts';
import { formLabel, termEntries, termValueText } from '#src/lib/term-words.ts';
import { Formula } from '../formula.tsx';

/** The terms of an interaction, form by form with its parameters. */
export function InteractionTerms({ terms }: Pick<InteractionContent, 'terms'>) {
  const forms = useQuery(formsQuery).data ?? [];
  return (
    <ul className="flex flex-col gap-3">
      {terms.map((term, index) => {
        const form = forms.find(({ key }) => key === term.form);
        return (
          <li key={index} className="min-w-0">
            <p className="font-semibold">
              {terms.length > 1 && `Term ${index + 1}: `}
              <Link
                to={`/reference/forms/${term.form}`}
                className="rounded underline decoration-line underline-offset-4 hover:decoration-barn"
              >
                {formLabel(term.form, forms)}
              </Link>
            </p>
            {form && <Formula display tex={form.formula} />}
            <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-4 gap-y-0.5">
              {termEntries(term, forms).map(({ key, label, value }) => (
                <div key={key} className="contents">
                  <dt className="text-muted">{label}</dt>
                  <dd className="min-w-0 font-mono text-sm break-words">{termValueText(value)}</dd>
                </div>
              ))}
            </dl>
          </li>
        );
      })}
    </ul>
  );
}
