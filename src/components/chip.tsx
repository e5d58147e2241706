import type { ReactNode } from 'react';
import { BadgeCheck, CircleCheck, CircleOff, Eye, Layers, PenLine } from 'lucide-react';
import type { Status } from '#shared/contracts/cases.ts';
import { classNames } from '#src/lib/class-names.ts';

export type Tone = 'sound' | 'attention' | 'fault' | 'info' | 'plain';

const TONES: Record<Tone, string> = {
  sound: 'bg-field-soft text-field',
  attention: 'bg-straw-soft text-straw',
  fault: 'bg-fault-soft text-fault',
  info: 'bg-slate-soft text-slate',
  plain: 'bg-soft text-muted',
};

/** A state in one word, with a picture of its own, so that the hue is never alone. */
export function Chip({
  tone,
  icon,
  children,
  className,
}: {
  tone: Tone;
  icon?: ReactNode;
  children: ReactNode;
  className?: string;
}) {
  return (
    <span
      className={classNames(
        'inline-flex items-center gap-1.5 rounded px-2 py-0.5 text-xs font-semibold whitespace-nowrap',
        TONES[tone],
        className,
      )}
    >
      {icon}
      {children}
    </span>
  );
}

const STATUS: Record<Status, { tone: Tone; label: string; Icon: typeof Eye }> = {
  draft: { tone: 'attention', label: 'Draft', Icon: PenLine },
  inReview: { tone: 'info', label: 'In review', Icon: Eye },
  approved: { tone: 'sound', label: 'Approved', Icon: CircleCheck },
  released: { tone: 'sound', label: 'Released', Icon: BadgeCheck },
  superseded: { tone: 'plain', label: 'Superseded', Icon: Layers },
  withdrawn: { tone: 'plain', label: 'Withdrawn', Icon: CircleOff },
};

export function statusLabel(status: Status): string {
  return STATUS[status].label;
}

export function StatusChip({ status }: { status: Status }) {
  const { tone, label, Icon } = STATUS[status];
  return (
    <Chip tone={tone} icon={<Icon aria-hidden="true" className="size-3.5" />}>
      {label}
    </Chip>
  );
}
