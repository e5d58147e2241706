import type { ReactNode } from 'react';
import { Copy, Redo2, Undo2 } from 'lucide-react';
import { Button, IconButton } from '#src/components/button.tsx';
import { Chip, StatusChip } from '#src/components/chip.tsx';
import type { CaseDetail, Status } from '#shared/contracts/cases.ts';
import { momentText } from '../model/moments.ts';
import { TitleField } from './title-field.tsx';

interface CaseHeaderProps {
  detail: CaseDetail | null;
  title: string;
  readOnly: boolean;
  dirty: boolean;
  onTitle: (title: string) => void;
  undo: (() => void) | null;
  redo: (() => void) | null;
  onDuplicate: () => void;
  onSave: () => void;
  saving: boolean;
  /** The version shown, where it is not the newest that is worked on. */
  version?: { n: number; createdAt: string; status: Status } | undefined;
  /** In place of the buttons that save. */
  instead?: ReactNode;
}

function Meta({ detail, dirty, version }: Pick<CaseHeaderProps, 'detail' | 'dirty' | 'version'>) {
  const unsaved = dirty && <span className="text-straw">unsaved changes</span>;
  if (!detail) {
    return (
      <p className="mb-0.5 flex flex-wrap items-center gap-x-2 text-sm text-muted">
        New case <Chip tone="plain">not saved yet</Chip>
      </p>
    );
  }
  const { number, campaign, tags } = detail;
  const shown = version ?? { ...detail.version, status: detail.status };
  return (
    <p className="mb-0.5 flex flex-wrap items-center gap-x-2 gap-y-0.5 text-sm text-muted">
      <span>
        Case {number} · {campaign ? `${campaign.name} · ` : ''}version {shown.n}
        {version && ` of ${detail.version.n}`}, saved{' '}
        <time dateTime={shown.createdAt}>{momentText(shown.createdAt)}</time>
        {tags.length > 0 && ` · ${tags.join(', ')}`}
      </span>
      <StatusChip status={shown.status} />
      {unsaved}
    </p>
  );
}

export function CaseHeader(props: CaseHeaderProps) {
  const { detail, title, readOnly, dirty, onTitle, undo, redo } = props;
  const next = (detail?.version.n ?? 0) + 1;
  return (
    <div className="mb-4 flex flex-wrap items-end justify-between gap-x-4 gap-y-3">
      <div className="min-w-0 flex-1 basis-80">
        <Meta detail={detail} dirty={dirty} version={props.version} />
        <TitleField title={title} readOnly={readOnly} onChange={onTitle} />
      </div>
      <div className="flex flex-wrap items-center gap-2" data-screen-only>
        {!readOnly && (
          <div className="flex">
            <IconButton label="Undo (Ctrl+Z)" disabled={!undo} onClick={() => undo?.()}>
              <Undo2 aria-hidden="true" className="size-4.5" />
            </IconButton>
            <IconButton label="Redo (Ctrl+Shift+Z)" disabled={!redo} onClick={() => redo?.()}>
              <Redo2 aria-hidden="true" className="size-4.5" />
            </IconButton>
          </div>
        )}
        <Button onClick={props.onDuplicate}>
          <Copy aria-hidden="true" className="size-4" /> Duplicate
        </Button>
        {props.instead ??
          (!readOnly && (
            <Button
              look="primary"
              busy={props.saving}
              onClick={props.onSave}
              title="Ctrl+S"
              aria-keyshortcuts="Control+S"
            >
              {detail ? `Save version ${next}` : 'Save case'}
            </Button>
          ))}
      </div>
    </div>
  );
}
