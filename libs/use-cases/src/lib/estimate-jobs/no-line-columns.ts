/** The columns of an estimate's line that only some kinds fill, empty: a line of one kind leaves those of the others. */
export const NO_LINE_COLUMNS = {
  operationId: null,
  machineId: null,
  setupHours: null,
  minutesPerPiece: null,
  pieces: null,
  labourRate: null,
  machineHourRate: null,
  overheadRate: null,
  materialId: null,
  weightKg: null,
  pricePerKg: null,
  amount: null,
} as const;
