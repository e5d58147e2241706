import { nearDate, wholeDate } from '#src/lib/dates.ts';

/** A moment, short to read and whole on hover. */
export function When({ iso, className }: { iso: string; className?: string }) {
  return (
    <time dateTime={iso} title={wholeDate(iso)} className={className}>
      {nearDate(iso)}
    </time>
  );
}
