/** The version of the application: that of package.json, held together by a test. */
export const VERSION = '0.3.0';
