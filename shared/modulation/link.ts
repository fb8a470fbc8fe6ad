import { decibels } from './decibels'
import { ModulationError } from './errors'

/** Boltzmann constant, J/K: exact since the 2019 definition of the kelvin (CODATA). */
export const boltzmann = 1.380649e-23
/** Speed of light in vacuum, m/s: exact (CODATA). */
export const speedOfLight = 299_792_458
/** Reference temperature of noise figures, K (IEEE). */
export const referenceTemperature = 290

export type PowerUnit = 'dBm' | 'dBW'

type LineBase = { id: string, name: string, source?: string }

/** One line of a link budget. Losses are entered positive and subtracted. */
export type LinkLine = LineBase & (
  | { kind: 'power', unit: PowerUnit, valueDb: number }
  | { kind: 'gain', valueDb: number }
  | { kind: 'loss', valueDb: number }
  | { kind: 'freeSpaceLoss', frequencyGhz: number, distanceKm: number }
  | { kind: 'noiseFigure', noiseFigureDb: number }
)

/** A line with what it came to. */
export type LinkStep = {
  line: LinkLine
  /** as shown beside the line: dBm or dBW, dB (losses positive), or the noise density in dBm/Hz or dBW/Hz */
  valueDb: number
  /** level after this line in the case's unit; null before the power line and at the noise line */
  levelDb: number | null
}

export type LinkCaseResult = {
  steps: LinkStep[]
  unit: PowerUnit
  /** in the case's unit */
  receivedLevel: number
  /** in the case's unit per Hz */
  noiseDensity: number
  noiseDensityDbmHz: number
  cOverN0DbHz: number
}

/**
 * Free-space loss (4πdf/c)² in dB: 92.45 + 20·log10 f + 20·log10 d.
 * @param frequencyGhz above 0
 * @param distanceKm above 0
 * @throws ModulationError when either is not a positive number
 * @see Recommendation ITU-R P.525
 */
export function freeSpaceLossDb(frequencyGhz: number, distanceKm: number): number {
  if (!(frequencyGhz > 0 && frequencyGhz < Infinity)) throw new ModulationError('A frequency is a number above 0 GHz.', ['frequencyGhz'])
  if (!(distanceKm > 0 && distanceKm < Infinity)) throw new ModulationError('A distance is a number above 0 km.', ['distanceKm'])
  return 20 * (Math.log10(4 * Math.PI * 1e12 / speedOfLight) + Math.log10(frequencyGhz) + Math.log10(distanceKm))
}

/**
 * Noise density N0 = k·T·F in dBm/Hz; −173.98 dBm/Hz at 290 K and 0 dB.
 * @param noiseFigureDb dB
 * @param temperatureK of the source, K
 * @throws ModulationError when the temperature is not positive
 */
export function noiseDensityDbmHz(noiseFigureDb: number, temperatureK = referenceTemperature): number {
  if (!(temperatureK > 0)) throw new ModulationError('A noise temperature is a number above 0 K.', ['temperatureK'])
  return decibels(boltzmann * temperatureK * 1000) + noiseFigureDb
}

const lineValue = (line: LinkLine, unit: PowerUnit): number => {
  switch (line.kind) {
    case 'freeSpaceLoss': return freeSpaceLossDb(line.frequencyGhz, line.distanceKm)
    case 'noiseFigure': return noiseDensityDbmHz(line.noiseFigureDb) - (unit === 'dBW' ? 30 : 0)
    default: return line.valueDb
  }
}

const signOf = { power: 1, gain: 1, loss: -1, freeSpaceLoss: -1, noiseFigure: 0 } as const

const powerUnitOf = (lines: readonly LinkLine[]): PowerUnit => {
  const powers = lines.flatMap((line, index) => line.kind === 'power' ? [{ line, index }] : [])
  const [first, second] = powers
  if (!first) throw new ModulationError('A link case needs a power line, in dBm or dBW, to start from.', ['lines'])
  const other = powers.find(({ line }) => line.unit !== first.line.unit)
  if (other) {
    const sentence = `“${first.line.name}” is in ${first.line.unit} and “${other.line.name}” in ${other.line.unit}: use one unit in a link case.`
    throw new ModulationError(sentence, ['lines', other.index, 'unit'])
  }
  if (second) {
    const sentence = `“${second.line.name}” is a second power: a link case has one, and further stages are gains or losses in dB.`
    throw new ModulationError(sentence, ['lines', second.index, 'kind'])
  }
  return first.line.unit
}

const checkLines = (lines: readonly LinkLine[]) => {
  const noises = lines.filter(line => line.kind === 'noiseFigure').length
  if (noises !== 1) throw new ModulationError(`A link case has exactly one noise line; this one has ${noises === 0 ? 'none' : noises}.`, ['lines'])
  lines.forEach((line, index) => {
    if (line.kind === 'freeSpaceLoss') return
    const [field, value] = line.kind === 'noiseFigure' ? ['noiseFigureDb', line.noiseFigureDb] as const : ['valueDb', line.valueDb] as const
    if (!Number.isFinite(value)) throw new ModulationError(`“${line.name}” is a finite number in dB.`, ['lines', index, field])
    if (line.kind === 'loss' && value < 0) {
      throw new ModulationError(`“${line.name}” is a loss: enter it positive, it is subtracted.`, ['lines', index, field])
    }
  })
}

/**
 * C/N0 in dBHz as the sum of a case's lines, with the level after each.
 * The order of the lines only matters for the running levels.
 * @throws ModulationError for no or several power lines, dBm mixed with dBW, not exactly one noise line, or a negative loss
 * @see methods §7
 */
export function linkCase(lines: readonly LinkLine[]): LinkCaseResult {
  const unit = powerUnitOf(lines)
  checkLines(lines)
  let level = 0
  let started = false
  const steps = lines.map((line): LinkStep => {
    const valueDb = lineValue(line, unit)
    if (line.kind === 'noiseFigure') return { line, valueDb, levelDb: null }
    level += signOf[line.kind] * valueDb
    started ||= line.kind === 'power'
    return { line, valueDb, levelDb: started ? level : null }
  })
  const noiseDensity = steps.find(step => step.line.kind === 'noiseFigure')!.valueDb
  return {
    steps,
    unit,
    receivedLevel: level,
    noiseDensity,
    noiseDensityDbmHz: noiseDensity + (unit === 'dBW' ? 30 : 0),
    cOverN0DbHz: level - noiseDensity,
  }
}

/**
 * Available Es/N0 in dB: C/N0 − back-off − 10·log10 Rs.
 * @param cOverN0DbHz dBHz, at saturation when the amplifier is limited by peak power
 * @param symbolRateHz above 0
 * @param backOffDb 0 where mean power is the limit
 * @see methods §7
 */
export function availableEsN0Db(cOverN0DbHz: number, symbolRateHz: number, backOffDb: number): number {
  if (!(symbolRateHz > 0)) throw new ModulationError('A symbol rate is a number above 0.', ['symbolRateHz'])
  return cOverN0DbHz - backOffDb - decibels(symbolRateHz)
}

/** Margin in dB: available − required − implementation loss (methods §7). */
export function marginDb(availableDb: number, requiredDb: number, implementationLossDb: number): number {
  return availableDb - requiredDb - implementationLossDb
}

/** Surplus in dB: margin − required margin; the worst over the cases decides (methods §7). */
export function surplusDb(margin: number, requiredMarginDb: number): number {
  return margin - requiredMarginDb
}

/**
 * Receiver threshold, the level at which the target is just met: N0 + 10·log10 Rs + required + implementation loss.
 * @param noiseDensity dBm/Hz (or dBW/Hz)
 * @param symbolRateHz above 0
 * @param requiredEsN0Db dB
 * @param implementationLossDb dB
 * @returns dBm (or dBW)
 */
export function receiverThreshold(noiseDensity: number, symbolRateHz: number, requiredEsN0Db: number, implementationLossDb: number): number {
  if (!(symbolRateHz > 0)) throw new ModulationError('A symbol rate is a number above 0.', ['symbolRateHz'])
  return noiseDensity + decibels(symbolRateHz) + requiredEsN0Db + implementationLossDb
}
