import { useState } from 'react';
import { Segmented } from '#src/components/segmented.tsx';
import type { Scale } from '#src/components/plot-types.ts';
import type { Abscissa } from '../model/curves.ts';

export interface Scales {
  yScale: Scale;
  setScale: (scale: Scale) => void;
  abscissa: Abscissa;
  setAbscissa: (abscissa: Abscissa) => void;
}

export function useScales(start: Scale = 'log'): Scales {
  const [yScale, setScale] = useState<Scale>(start);
  const [abscissa, setAbscissa] = useState<Abscissa>('theta');
  return { yScale, setScale, abscissa, setAbscissa };
}

/** Scale and abscissa of a distribution. */
export function ScaleSwitches({ yScale, setScale, abscissa, setAbscissa }: Scales) {
  return (
    <>
      <Segmented
        label="Scale of dσ/dΩ"
        value={yScale}
        choices={[
          { value: 'log', label: 'log' },
          { value: 'linear', label: 'linear' },
        ]}
        onChange={setScale}
      />
      <Segmented
        label="Abscissa"
        value={abscissa}
        choices={[
          { value: 'theta', label: 'θ' },
          { value: 'q', label: 'q' },
          { value: 'cos', label: 'cos θ' },
        ]}
        onChange={setAbscissa}
      />
    </>
  );
}
