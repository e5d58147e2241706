import { useCallback, useState } from 'react';
import { unitsOf } from '#shared/units/vocabulary.ts';

const KEY = 'tallybarn.area-unit';

function remembered(): string | null {
  try {
    const unit = localStorage.getItem(KEY);
    return unit !== null && unitsOf('area').includes(unit) ? unit : null;
  } catch (refused) {
    console.info('Storage is closed to this page; the unit lasts until it is left.', refused);
    return null;
  }
}

function remember(unit: string): void {
  try {
    localStorage.setItem(KEY, unit);
  } catch (refused) {
    console.info('Storage is closed to this page; the unit lasts until it is left.', refused);
  }
}

/** The unit cross sections are shown in: the one last chosen where a number stands, else that of the document. It only changes what is shown. */
export function useAreaUnit(ofDocument: string): [string, (unit: string) => void] {
  const [chosen, setChosen] = useState(remembered);
  const choose = useCallback((unit: string) => {
    setChosen(unit);
    remember(unit);
  }, []);
  return [chosen ?? ofDocument, choose];
}
