import { useMemo, useState, type ReactNode } from 'react';
import { AidsContext } from './aids-context.ts';
import type { AidsState, AngleRange } from './aids-context.ts';

export function AidsProvider({ children }: { children: ReactNode }) {
  const [range, setRange] = useState<AngleRange | null>(null);
  const [marking, setMarking] = useState(false);
  const [ratio, setRatio] = useState(false);
  const state = useMemo<AidsState>(
    () => ({ range, setRange, marking, setMarking, ratio, setRatio }),
    [range, marking, ratio],
  );
  return <AidsContext value={state}>{children}</AidsContext>;
}
