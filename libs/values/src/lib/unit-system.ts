/** How a shop shows quantities: inches, pounds and US tons, or millimetres, kilograms and kilonewtons. */
export const UNIT_SYSTEMS = ['us', 'metric'] as const;

/** One of the two ways of showing quantities. */
export type UnitSystem = (typeof UNIT_SYSTEMS)[number];

/** Whether a text names a unit system. */
export function isUnitSystem(text: string): text is UnitSystem {
  return (UNIT_SYSTEMS as readonly string[]).includes(text);
}
