/** Limits that the screens state and the server enforces. */
export const LIMITS = {
  uploadBytesMax: 10 * 1024 * 1024,
  timesheetRowsMax: 100_000,
  headerRowsSearched: 30,
  checkRowsShown: 1_000,
  pageSizeMax: 500,
  pageSizeDefault: 100,
  passwordLengthMin: 12,
  passwordLengthMax: 200,
  signInFailuresMax: 8,
  lockMinutes: 15,
  sessionHours: 12,
} as const;
