import { TriangleAlert } from 'lucide-react';

/** What to know of an entry before using it, in words; what can mislead carries a sign. */
export function Cautions({ lines }: { lines: readonly string[] }) {
  if (lines.length === 0) return <span className="text-muted">–</span>;
  return (
    <ul className="flex flex-col gap-1 text-sm">
      {lines.map((line) => {
        const grave = /^(Contradiction|Resonant)/.test(line);
        return (
          <li key={line} className={grave ? 'flex gap-1.5 text-straw' : 'text-muted'}>
            {grave && <TriangleAlert aria-hidden="true" className="mt-0.5 size-4 shrink-0" />}
            <span>{line}</span>
          </li>
        );
      })}
    </ul>
  );
}
