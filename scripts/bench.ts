/** Timings of one run, as ratios: `npm run bench`. The machine's noise is in them; nothing is asserted. */
import { benchEstimates } from './bench/estimates.ts';
import { benchFirstBorn } from './bench/first-born.ts';
import { benchForms } from './bench/forms.ts';
import { benchPartialWaves } from './bench/partial-waves.ts';

benchFirstBorn();
benchForms();
benchPartialWaves();
await benchEstimates();
