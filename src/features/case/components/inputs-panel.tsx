import type { Station } from '#src/components/station-glyph.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { problemsByStation } from '../model/problems.ts';
import { STATIONS, isOfPlan } from '../model/stations.ts';
import type { StationSummary } from '../model/stations.ts';
import { BeamInputs } from './beam-inputs.tsx';
import { DetectorsInputs } from './detectors-inputs.tsx';
import { InteractionInputs } from './interaction-inputs.tsx';
import { StationGroup } from './station-group.tsx';
import { TargetInputs } from './target-inputs.tsx';

export const STATION_NAMES: Record<Station, string> = {
  beam: 'Beam',
  target: 'Target',
  interaction: 'Interaction',
  detectors: 'Detectors',
};

const INPUTS: Record<Station, () => React.ReactNode> = {
  beam: BeamInputs,
  target: TargetInputs,
  interaction: InteractionInputs,
  detectors: DetectorsInputs,
};

interface InputsPanelProps {
  summaries: Record<Station, StationSummary>;
  closed: ReadonlySet<Station>;
  onToggle: (station: Station) => void;
  onEnter: (station: Station) => void;
}

/** All inputs, in the order of the beam line, beside every section. */
export function InputsPanel({ summaries, closed, onToggle, onEnter }: InputsPanelProps) {
  const { problems } = useEditing();
  // Fields of the run plan stand in a section of their own.
  const faults = problemsByStation(problems.filter(({ path }) => !isOfPlan(path)));
  return (
    <form
      aria-label="Inputs"
      className="rounded border border-line bg-sheet"
      onSubmit={(event) => event.preventDefault()}
    >
      {STATIONS.map((station) => {
        const Inputs = INPUTS[station];
        const { main, detail } = summaries[station];
        return (
          <StationGroup
            key={station}
            station={station}
            name={STATION_NAMES[station]}
            open={!closed.has(station)}
            onToggle={() => onToggle(station)}
            onEnter={() => onEnter(station)}
            summary={`${main} · ${detail}`}
            faulty={faults[station].length > 0}
          >
            <Inputs />
          </StationGroup>
        );
      })}
    </form>
  );
}
