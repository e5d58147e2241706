import type { ReactNode } from 'react';
import { CircleAlert, CircleCheck, Info, TriangleAlert } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';

export type NoticeTone = 'sound' | 'attention' | 'fault' | 'info';

const LOOKS: Record<NoticeTone, { box: string; text: string; Icon: typeof Info }> = {
  sound: { box: 'border-field bg-field-soft', text: 'text-field', Icon: CircleCheck },
  attention: { box: 'border-straw bg-straw-soft', text: 'text-straw', Icon: TriangleAlert },
  fault: { box: 'border-fault bg-fault-soft', text: 'text-fault', Icon: CircleAlert },
  info: { box: 'border-slate bg-slate-soft', text: 'text-slate', Icon: Info },
};

interface NoticeProps {
  tone: NoticeTone;
  title?: ReactNode;
  children?: ReactNode;
  actions?: ReactNode;
  /** Read out as soon as it appears; for what follows from something the person just did. */
  live?: boolean;
  className?: string;
}

/** A remark that stays: what happened, what was kept, what to do. */
export function Notice({ tone, title, children, actions, live, className }: NoticeProps) {
  const { box, text, Icon } = LOOKS[tone];
  return (
    <div
      {...(live ? { role: tone === 'fault' ? 'alert' : 'status' } : {})}
      className={classNames('flex gap-3 rounded border-l-[3px] px-3.5 py-2.5', box, className)}
    >
      <Icon aria-hidden="true" className={classNames('mt-0.5 size-5 shrink-0', text)} />
      <div className="flex min-w-0 flex-1 flex-wrap items-start justify-between gap-x-4 gap-y-2">
        <div className="min-w-0 flex-1 basis-56">
          {title && <p className="font-semibold">{title}</p>}
          {children}
        </div>
        {actions && <div className="flex flex-wrap gap-2">{actions}</div>}
      </div>
    </div>
  );
}
