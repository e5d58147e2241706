import { Notice } from '#src/components/notice.tsx';
import type { FieldError } from '#shared/errors.ts';

/** What still stands in the way of a save. */
export function Unsound({ problems }: { problems: readonly FieldError[] }) {
  if (problems.length === 0) return null;
  return (
    <Notice tone="fault" title="These inputs cannot be saved as they stand.">
      <ul className="list-disc pl-4">
        {problems.map(({ path, message }) => (
          <li key={path + message}>{message}</li>
        ))}
      </ul>
    </Notice>
  );
}
