/** Cents of a money text such as '$1,234.50' or '−$12.00'. @throws Error when it is none */
export function toCents(text: string): number {
  const [, sign, whole, cents] = /^\s*([-−]?)\$([\d,]+)\.(\d\d)\s*$/.exec(text) ?? [];
  if (whole === undefined || cents === undefined) throw new Error(`'${text}' is no amount of money.`);
  const amount = Number(whole.replaceAll(',', '')) * 100 + Number(cents);
  return sign ? -amount : amount;
}

/** Hours of the text of a cell or figure: '7.50', '7.50 h' or '7:30'. @throws Error when it is none */
export function toHours(text: string): number {
  const [, hours, minutes] = /^\s*(\d+):(\d\d)(?::00)?\s*$/.exec(text) ?? [];
  if (hours !== undefined && minutes !== undefined) return Number(hours) + Number(minutes) / 60;
  const [, plain] = /^\s*([\d,]+(?:\.\d+)?)(?:\s*h)?\s*$/.exec(text) ?? [];
  if (plain === undefined) throw new Error(`'${text}' is no number of hours.`);
  return Number(plain.replaceAll(',', ''));
}
