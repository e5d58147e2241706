import { Link } from 'react-router-dom';
import { BeamLineRow } from '#src/components/beam-line-row.tsx';
import { STARTS } from '#src/lib/starts.ts';

/** New cases that begin with something sensible in every field. */
export function Starts() {
  return (
    <section aria-labelledby="starts">
      <h2 id="starts" className="mb-2 text-lg font-semibold">
        Begin with
      </h2>
      <ul className="grid gap-3 md:grid-cols-3">
        {STARTS.map((start) => (
          <li key={start.key}>
            <Link
              to={`/cases/new?start=${start.key}`}
              className="flex h-full flex-col gap-2 rounded border border-line bg-sheet px-4 py-3 hover:border-barn"
            >
              <span className="font-semibold">{start.title}</span>
              <BeamLineRow summary={start.summary} />
            </Link>
          </li>
        ))}
      </ul>
    </section>
  );
}
