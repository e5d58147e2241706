import { Link } from 'react-router-dom';
import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { Station } from '#src/components/station-glyph.tsx';
import type { VersionHead } from '#shared/contracts/cases.ts';
import type { FieldError } from '#shared/errors.ts';
import type { Work } from '../editing/use-work.ts';
import { momentText } from '../model/moments.ts';
import { isOfPlan, stationOf } from '../model/stations.ts';
import { STATION_NAMES } from './inputs-panel.tsx';
import { useSectionAddress } from './section-tabs.tsx';

/** What became of unsaved work. */
export function WorkNotices({ work, newest }: { work: Work; newest: VersionHead | null }) {
  const { restoredAt, other } = work;
  return (
    <>
      {restoredAt !== null && (
        <Notice
          tone="info"
          actions={
            <Button size="small" onClick={work.discard}>
              Discard
            </Button>
          }
        >
          Restored unsaved changes from {momentText(restoredAt)}.
        </Notice>
      )}
      {other && (
        <Notice
          tone="info"
          actions={
            <>
              <Button size="small" onClick={other.takeOver}>
                Take them over
              </Button>
              <Button size="small" onClick={other.forget}>
                Discard
              </Button>
            </>
          }
        >
          There are unsaved changes from {momentText(other.savedAt)}, made in another tab or before
          the browser was closed.
        </Notice>
      )}
      {work.overtaken && newest && (
        <Notice tone="attention">
          Version {newest.n} was saved by {newest.author.name}, {momentText(newest.createdAt)},
          after you began. Your changes are kept; saving will set both side by side, field by field.
        </Notice>
      )}
      {!work.kept && (
        <Notice tone="attention" title="Unsaved work cannot be kept on this computer.">
          The browser refuses storage: save before you leave this page.
        </Notice>
      )}
    </>
  );
}

interface ProblemSummaryProps {
  problems: readonly FieldError[];
  onOpen: (station: Station) => void;
}

/** All that is wrong in one place, each with the way to its station. */
export function ProblemSummary({ problems, onOpen }: ProblemSummaryProps) {
  const addressOf = useSectionAddress();
  if (problems.length === 0) return null;
  return (
    <Notice
      live
      tone="fault"
      title={`${problems.length === 1 ? 'One input needs' : `${problems.length} inputs need`} mending; the figures below are those of the last sound inputs.`}
    >
      <ul>
        {problems.map(({ path, message }) => {
          const station = stationOf(path);
          return (
            <li key={`${path} ${message}`}>
              {isOfPlan(path) ? (
                <Link
                  to={addressOf('run-plan')}
                  state={{ keepFocus: true }}
                  className="rounded underline underline-offset-3"
                >
                  Run plan
                </Link>
              ) : (
                <button
                  type="button"
                  className="rounded text-left underline underline-offset-3"
                  onClick={() => onOpen(station)}
                >
                  {STATION_NAMES[station]}
                </button>
              )}
              : {message}
            </li>
          );
        })}
      </ul>
    </Notice>
  );
}
