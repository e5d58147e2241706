import { Link } from 'react-router-dom';
import type { FormItem } from '#shared/contracts/reference.ts';
import { Formula } from '#src/components/formula.tsx';
import { Sketch } from './sketch.tsx';

/** The potential itself, without the definitions that follow it. */
function firstPart(tex: string): string {
  return tex.split(/,?\s*\\q?quad/)[0] ?? tex;
}

/** The forms of the register, each with its V(r), formula and way to its page. */
export function FormCards({ items }: { items: readonly FormItem[] }) {
  return (
    <ul className="grid gap-3 md:grid-cols-2 xl:grid-cols-3">
      {items.map(({ key, label, formula, sketch, source }) => (
        <li
          key={key}
          className="relative flex min-w-0 flex-col gap-1 rounded border border-line bg-sheet px-4 py-3 focus-within:border-edge hover:border-edge"
        >
          <div className="flex items-start justify-between gap-3">
            <h2 className="pt-1 text-lg font-semibold">
              <Link
                to={`/reference/forms/${key}`}
                className="rounded after:absolute after:inset-0 after:rounded"
              >
                {label}
              </Link>
            </h2>
            <Sketch points={sketch} />
          </div>
          <div className="max-w-full min-w-0 overflow-hidden [mask-image:linear-gradient(to_right,black_calc(100%-2.5rem),transparent)] py-1 whitespace-nowrap">
            <Formula tex={firstPart(formula)} />
          </div>
          <p className="mt-auto truncate text-xs text-muted">{source}</p>
        </li>
      ))}
    </ul>
  );
}
