import { ArrowRight } from 'lucide-react';
import { ButtonLink } from '#src/components/button.tsx';
import { startHref, type ReferenceStart } from '#src/lib/reference-start.ts';
import { mayEver, useSession } from '#src/lib/session.ts';

/** Whether the person files cases at all. */
export function useFilesCases(): boolean {
  return mayEver(useSession(), 'case.create');
}

/** The way from an entry into a new case; nothing to those who file none. */
export function UseInCase({
  start,
  label = 'Use in a case',
  look = 'plain',
}: {
  start: ReferenceStart;
  label?: string;
  look?: 'primary' | 'plain';
}) {
  if (!useFilesCases()) return null;
  return (
    <ButtonLink to={startHref(start)} look={look} {...(look === 'plain' ? { size: 'small' } : {})}>
      {label} <ArrowRight aria-hidden="true" className="size-4" />
    </ButtonLink>
  );
}
