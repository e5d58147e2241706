/** A caution in the words of the trade that says what to do; `info` where nothing is wrong. */
export interface Warning {
  code: string;
  message: string;
  level: 'caution' | 'info';
  path?: string;
}
