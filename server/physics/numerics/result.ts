/** How a numerical routine ended: `converged` within what was asked, `limited` by work or rounding (the error still bounds), `failed` without a usable value. */
export type NumericalStatus = 'converged' | 'limited' | 'failed';

/**
 * The one shape every numerical routine returns.
 * `error` bounds |value - true value| in the unit of `value`, rounding included; `evaluations` counts integrand calls (0 for a closed form).
 */
export interface NumericalResult {
  value: number;
  error: number;
  evaluations: number;
  status: NumericalStatus;
}
