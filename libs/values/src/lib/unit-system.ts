/** How a shop shows quantities: inches, pounds and US tons, or millimetres, kilograms and kilonewtons. */
export type UnitSystem = 'us' | 'metric';
