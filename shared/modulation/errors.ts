/** Where an input is wrong, and the sentence that says what is allowed. */
export interface Issue {
  path: (string | number)[]
  message: string
}

/**
 * Refusal of an input by the core. `message` is one plain sentence that says what is allowed,
 * `path` leads to the offending field of the input.
 */
export class ModulationError extends RangeError {
  readonly path: (string | number)[]

  constructor(message: string, path: (string | number)[] = []) {
    super(message)
    this.name = 'ModulationError'
    this.path = path
  }
}

/**
 * Refuses a noise density that is not a positive finite number.
 * @throws ModulationError with path ['n0']
 */
export function requireNoiseDensity(n0: number): void {
  if (!(n0 > 0 && n0 < Infinity)) throw new ModulationError('The noise density N0 is a finite number above 0.', ['n0'])
}
