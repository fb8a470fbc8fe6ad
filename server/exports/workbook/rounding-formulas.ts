/*
 * Roundings as formulas of a spreadsheet, by the rule of shared/modulation/rounding.ts: a number that misses a decimal by no more than
 * rounding error counts as that decimal. INT rounds towards minus infinity, unlike ROUNDDOWN.
 */

/**
 * How far a cell may be off its true value by rounding errors alone.
 * @param x address of a cell
 */
export const slackFormula = (x: string) => `1E-12*MAX(1,ABS(${x}))`

/**
 * Largest decimal of so many digits that is not above a cell: how margins are shown.
 * @param x address of a cell
 */
export const floorFormula = (x: string, digits: number) => `INT((${x}+${slackFormula(x)})*${10 ** digits})/${10 ** digits}`

/**
 * Smallest decimal of so many digits that is not below a cell.
 * @param x address of a cell
 */
export const ceilFormula = (x: string, digits: number) => `-INT((${slackFormula(x)}-${x})*${10 ** digits})/${10 ** digits}`

/**
 * Whether a distance from a limit is none but by rounding error.
 * @param by address of the distance, positive on the right side
 * @param limit address of the limit
 */
export const holdsFormula = (by: string, limit: string) => `${by}>=-${slackFormula(limit)}`
