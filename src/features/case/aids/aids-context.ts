import { createContext, useContext } from 'react';

/** Two angles, smaller first, in the unit they were chosen in. */
export interface AngleRange {
  from: number;
  to: number;
  unit: string;
}

/** What plot and aids share: the marked range of angles, and what the plot shows. */
export interface AidsState {
  /** Null until one is chosen. */
  range: AngleRange | null;
  setRange: (range: AngleRange) => void;
  /** True while dragging on the plot marks a range. */
  marking: boolean;
  setMarking: (on: boolean) => void;
  /** Whether the plot shows the ratio to two point charges in place of dσ/dΩ. */
  ratio: boolean;
  setRatio: (on: boolean) => void;
}

export const AidsContext = createContext<AidsState | null>(null);

export function useAidsState(): AidsState {
  const state = useContext(AidsContext);
  if (!state) throw new Error('This part stands inside the Cross section.');
  return state;
}
