import type { ReactNode } from 'react';
import { BeamLine } from '#src/components/beam-line.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { REST_MS, useShownProblems } from '../editing/shown-problems.ts';
import { useStations } from '../editing/use-stations.ts';
import { problemsByStation } from '../model/problems.ts';
import { STATIONS, summarise } from '../model/stations.ts';
import { InputsPanel, STATION_NAMES } from './inputs-panel.tsx';
import { ProblemSummary } from './notices.tsx';
import { SectionTabs } from './section-tabs.tsx';
import type { Section } from './section-tabs.tsx';
import { groupId } from './station-group.tsx';

interface CaseBodyProps {
  section: Section;
  notices: ReactNode;
  children: ReactNode;
}

/** Beam line, sections, and the inputs beside whichever section is open. */
export function CaseBody({ section, notices, children }: CaseBodyProps) {
  const { draft, forms, estimate, problems: atFields } = useEditing();
  const problems = useShownProblems(atFields, REST_MS);
  const stations = useStations(groupId);
  const summaries = summarise(draft.document, forms, estimate);
  const faults = problemsByStation(problems);
  return (
    <div className="@container">
      <div className="mb-5">
        <BeamLine
          selected={stations.selected}
          onOpen={stations.openStation}
          stations={STATIONS.map((key) => ({
            key,
            name: STATION_NAMES[key],
            ...summaries[key],
            problem: faults[key][0]?.message,
          }))}
        />
      </div>
      <SectionTabs section={section} />
      <div className="mb-4 flex flex-col gap-3 empty:hidden">
        {notices}
        <ProblemSummary problems={problems} onOpen={stations.openStation} />
      </div>
      <div className="grid items-start gap-x-5.5 gap-y-5 @3xl:grid-cols-[17.5rem_minmax(0,1fr)] @5xl:grid-cols-[20.75rem_minmax(0,1fr)] print:block">
        <div className="order-2 min-w-0 @3xl:sticky @3xl:top-3 @3xl:order-1 @3xl:max-h-[calc(100svh-1.5rem)] @3xl:overflow-y-auto print:hidden">
          <InputsPanel
            summaries={summaries}
            closed={stations.closed}
            onToggle={stations.toggle}
            onEnter={stations.setSelected}
          />
        </div>
        <div className="@container order-1 min-w-0 @3xl:order-2">{children}</div>
      </div>
    </div>
  );
}
