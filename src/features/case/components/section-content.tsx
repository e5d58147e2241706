import { Button } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import type { CaseDetail, VersionDetail } from '#shared/contracts/cases.ts';
import { useEditing } from '../editing/editor-context.ts';
import { CrossSection } from './cross-section.tsx';
import { GoldenRuleSheet } from './golden-rule.tsx';
import { InputList } from './input-list.tsx';
import { Record } from './record.tsx';
import type { Section } from './section-tabs.tsx';
import { RunPlanSection } from '../run-plan/run-plan-section.tsx';
import { ValiditySection } from '../validity/validity-section.tsx';
import { NothingFiled } from './withdraw.tsx';

interface SectionContentProps {
  section: Section;
  saved: { detail: CaseDetail; etag: string } | null;
  /** A version that is looked at as it was saved. */
  version?: VersionDetail;
  failure: string | null;
  onRetry: () => void;
}

function FirstResult() {
  return (
    <Waiting what="the result">
      <div className="flex flex-col gap-4">
        <Skeleton className="h-22" />
        <Skeleton className="h-115" />
      </div>
    </Waiting>
  );
}

function fileNameOf(saved: SectionContentProps['saved']): string {
  return saved ? `case-${saved.detail.number}-dcs` : 'new-case-dcs';
}

export function SectionContent(props: SectionContentProps) {
  const { section, saved, version, failure, onRetry } = props;
  const { estimate, problems } = useEditing();
  if (section === 'record') {
    return saved ? <Record detail={saved.detail} etag={saved.etag} /> : <NothingFiled />;
  }
  if (section === 'run-plan') {
    return (
      <>
        <InputList />
        <RunPlanSection
          fileName={fileNameOf(saved).replace(/-dcs$/, '')}
          saved={version?.result.runPlan}
        />
      </>
    );
  }
  if (section === 'validity') {
    return (
      <>
        <InputList />
        <ValiditySection fileName={fileNameOf(saved).replace(/-dcs$/, '')} />
      </>
    );
  }
  const trouble = failure !== null && (
    <Notice
      live
      tone="fault"
      title="The result could not be computed."
      actions={
        <Button size="small" onClick={onRetry}>
          Try again
        </Button>
      }
      className="mb-4"
    >
      {failure}
    </Notice>
  );
  if (!estimate) {
    if (trouble) return trouble;
    return problems.length > 0 ? (
      <p className="text-muted">The figures appear here once the inputs are sound.</p>
    ) : (
      <FirstResult />
    );
  }
  return (
    <>
      {trouble}
      <InputList />
      {section === 'golden-rule' && (
        <GoldenRuleSheet
          estimate={estimate}
          fileName={fileNameOf(saved).replace(/-dcs$/, '-golden-rule')}
        />
      )}
      {section === 'cross-section' && (
        <CrossSection estimate={estimate} fileName={fileNameOf(saved)} />
      )}
    </>
  );
}
