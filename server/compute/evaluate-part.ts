import { bitMetricRate, directionalEstimate, largestGainDb, largestRotationRad, mapEstimate, mapNotes, ModulationError, mutualInformation, serLowerBound, serMap, valueOf } from '#shared/modulation'
import type { Estimate } from '#shared/modulation'
import { frameErrorRate } from '#shared/modulation/frame-error'
import type { Issue } from '#shared/schemas/common'
import type { PartName, PartValuesOf, PartValues, StoredPart } from '#shared/schemas/parts'
import type { BitErrorCurves, InformationCurves } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { bitErrorCurves, informationCurves } from './curves'
import { errorRateOf, modelOf } from './error-rates'
import type { ErrorKind, RowModel } from './error-rates'
import { geometryOf, labelledGeometryOf, noiseDensityAt } from './points'
import { thresholdOf } from './required'
import { rowPath } from './row-path'
import { availableAt, settingOf } from './setting'
import type { Setting } from './setting'

/** What is stored of a part; values are null when it has errors. */
export interface EvaluatedPart { values: PartValues | BitErrorCurves | InformationCurves | null, errors: Issue[] }

/** A row with points, and N0 at its available Es/N0. */
interface Row { inputs: CanonicalInputs, model: RowModel, setting: Setting, n0: number }

const refusal = (message: string, path: string) => new ModulationError(message, [path])

/** A number that a row does not have is null, whatever the reason. */
function orNull<T>(find: () => T): T | null {
  try {
    return find()
  } catch (error) {
    if (error instanceof ModulationError) return null
    throw error
  }
}

const at = ({ model, n0 }: Row, kind: ErrorKind): Estimate | null => errorRateOf(model, kind)?.rates([n0])[0] ?? null
const plain = (estimate: Estimate | null) => estimate === null ? null : valueOf(estimate)

function requireLabels({ model }: Row) {
  if (labelledGeometryOf(model.points).constellation.labels) return
  throw refusal('A bit error rate needs labels: take a power of two of points, or enter labels of your own.', 'labelling')
}

/** What only noise may disturb. */
function requireNoiseAlone({ inputs: { channel, phaseErrorDeg } }: Row, what: string) {
  if (channel) throw refusal(`${what} for the AWGN channel.`, 'channel')
  if (phaseErrorDeg) throw refusal(`${what} without a phase error: enter 0.`, 'phaseErrorDeg')
}

function bits(row: Row): PartValuesOf<'bits'> {
  requireLabels(row)
  const { model, inputs: { study } } = row
  return {
    berExact: at(row, 'berExact'), berNearest: plain(at(row, 'berNearest')), berAllPairs: plain(at(row, 'berAllPairs')),
    requiredBerEsN0Db: orNull(() => errorRateOf(model, 'berExact')?.required(study.target.value).esN0Db ?? null),
  }
}

function rates(row: Row): PartValuesOf<'rates'> {
  requireNoiseAlone(row, 'Information rates are')
  const { model: { points }, n0, setting: { netBits } } = row
  const { constellation } = labelledGeometryOf(points)
  const threshold = (kind: 'mutualInformation' | 'bitMetricRate') => orNull(() => thresholdOf(points, kind, netBits))
  return {
    mutualInformation: mutualInformation(constellation, n0),
    bitMetricRate: constellation.labels ? bitMetricRate(constellation, n0) : null,
    thresholdMutualInformationDb: threshold('mutualInformation'),
    thresholdBitMetricDb: constellation.labels ? threshold('bitMetricRate') : null,
  }
}

function tolerances({ model }: Row): PartValuesOf<'tolerances'> {
  const geometry = geometryOf(model.points)
  const gain = largestGainDb(geometry)
  return {
    largestRotationDeg: orNull(() => largestRotationRad(geometry) * 180 / Math.PI),
    // No gain leads out of a cell that is a wedge about the origin.
    largestGainDb: Number.isFinite(gain) ? gain : null,
  }
}

function frames(row: Row): PartValuesOf<'frames'> {
  const { frameSymbols, codeRate } = row.inputs
  if (frameSymbols === undefined) throw refusal('Enter how many symbols a frame has.', 'frameSymbols')
  if (codeRate < 1) throw refusal('A frame error rate is for frames of uncoded symbols: use code rate 1.', 'codeRate')
  const ser = at(row, 'serExact')
  return { frameErrorRate: ser === null ? null : mapEstimate(ser, rate => frameErrorRate(rate, frameSymbols)) }
}

function lower(row: Row): PartValuesOf<'lower'> {
  requireNoiseAlone(row, 'The lower bound is')
  if (row.inputs.decision) throw refusal('The lower bound is for decisions by minimum distance: choose them.', 'decision')
  const geometry = geometryOf(row.model.points)
  return { serLower: serLowerBound(geometry, row.n0), serDirectional: directionalEstimate(geometry)(row.n0) }
}

function map(row: Row): PartValuesOf<'map'> {
  requireNoiseAlone(row, 'MAP decisions are')
  const { model, n0, inputs: { study: { target } } } = row
  const { constellation } = geometryOf(model.points)
  if (constellation.dimensions > 2) throw refusal('MAP decisions are for one and two dimensions: choose decisions by minimum distance.', 'decision')
  const { outside, vanished } = mapNotes(constellation, n0)
  const targeted = target.quantity === 'ber' ? 'berExact' : 'serExact'
  return {
    serMap: serMap(constellation, n0), mapOutside: outside.length, mapVanished: vanished.length,
    requiredMapEsN0Db: plain(orNull(() => errorRateOf({ ...model, decision: 'map' }, targeted)?.required(target.value).esN0Db ?? null)),
  }
}

const parts: { [P in PartName]: (row: Row) => PartValuesOf<P> } = { bits, rates, tolerances, frames, lower, map }

function compute(part: StoredPart, inputs: CanonicalInputs): EvaluatedPart['values'] {
  const model = modelOf(inputs)
  if (!model) throw refusal('An entered scheme has no points to compute this from.', 'family')
  if (part === 'curves-ber') return bitErrorCurves(model, inputs.range)
  if (part === 'curves-rate') return informationCurves(model, inputs.range)
  const setting = settingOf(inputs)
  const n0 = noiseDensityAt(geometryOf(model.points).constellation, availableAt(inputs, setting))
  return parts[part]({ inputs, model, setting, n0 })
}

/**
 * A part of a row's columns, or curves of it, that need heavy work.
 * @param part which
 * @param inputs canonical inputs
 * @returns errors instead of values when the core refuses them
 * @see methods §1, §2, §3, §5, §6
 */
export function evaluatePart(part: StoredPart, inputs: CanonicalInputs): EvaluatedPart {
  try {
    return { values: compute(part, inputs), errors: [] }
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return { values: null, errors: [{ path: rowPath(error.path), message: error.message }] }
  }
}
