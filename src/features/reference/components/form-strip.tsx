import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { formsTable } from '../api.ts';
import { Sketch } from './sketch.tsx';

/** The forms by the look of their V(r). */
export function FormStrip() {
  const { data, error, refetch } = useQuery(formsTable.page({ pageSize: 200 }));
  if (error) return <Failure what="The forms" error={error} onRetry={() => void refetch()} />;
  if (!data) {
    return (
      <Waiting what="the forms">
        <Skeleton className="h-44" />
      </Waiting>
    );
  }
  return (
    <div className="overflow-hidden rounded border border-line bg-sheet">
      <ul className="-mr-px -mb-px grid grid-cols-2 sm:grid-cols-3 md:grid-cols-4 xl:grid-cols-6">
        {data.items.map(({ key, label, sketch }) => (
          <li
            key={key}
            className="relative flex flex-col gap-1 border-r border-b border-line px-3 py-2.5 hover:bg-soft"
          >
            <Sketch points={sketch} />
            <Link
              to={`/reference/forms/${key}`}
              className="rounded text-sm after:absolute after:inset-0 after:rounded"
            >
              {label}
            </Link>
          </li>
        ))}
      </ul>
    </div>
  );
}
