import * as bits from './bit-error-columns'
import * as candidate from './candidate-columns'
import * as channel from './channel-columns'
import * as dimension from './dimension-columns'
import * as error from './error-columns'
import * as geometry from './geometry-columns'
import * as information from './information-columns'
import * as label from './label-columns'
import * as link from './link-columns'
import * as rate from './rate-columns'
import * as required from './required-columns'
import * as threshold from './threshold-columns'
import * as tolerance from './tolerance-columns'
import * as signal from './signal-columns'
import * as verdict from './verdict-columns'
import type { Column } from './column'

export { columnGroups, headerOf, whyOf } from './column'
export type { CellValue, Column, ColumnContext, ColumnGroup, ComputedColumn, Entry, InputColumn, Preset, Why } from './column'
export { formatEstimate, formatNumber, plain, plainEstimate } from './format'
export type { NumberFormat, Rounding } from './format'

/**
 * Every column of the grid, of exports and of the Methods page, in the order in which they stand.
 * A new one is an entry of its subject's file and a line here.
 */
export const columns: readonly Column[] = [
  candidate.name,
  verdict.verdict,
  verdict.surplus,
  candidate.family,
  candidate.order,
  candidate.rings,
  candidate.codeRate,
  candidate.basis,
  required.requiredEsN0,
  required.delta,
  required.requiredEbN0,
  link.papr,
  link.backOffValue,
  link.availableEsN0,
  link.receiverThreshold,
  rate.spectralEfficiency,
  rate.netRate,
  geometry.minimumDistance,
  geometry.nearestMean,
  geometry.relevantMean,
  error.serUnion,
  error.serNearest,
  error.serExact,
  required.boundPenalty,
  signal.snrRange,
  candidate.note,

  candidate.role,
  candidate.roleReason,
  candidate.phases,
  verdict.margin,
  verdict.requiredMargin,
  verdict.decidingCase,
  required.requiredEpkN0,
  required.requiredUnion,
  required.requiredAllPairs,
  required.requiredNearest,
  bits.requiredBer,
  tolerance.requiredMap,
  required.gapToCapacity,
  required.evm,
  threshold.rateKind,
  threshold.decoderGap,
  threshold.decoderGapSource,
  required.enteredEsN0,
  required.enteredNetBits,
  required.enteredSource,
  link.backOff,
  link.backOffDb,
  link.exceedance,
  link.backOffError,
  link.availableEbN0,
  link.implementationLoss,
  rate.symbolRate,
  rate.occupiedBandwidth,
  rate.netBits,
  rate.bitsPerSymbol,
  rate.rollOff,
  geometry.asymptoticEfficiency,
  geometry.dimensions,
  tolerance.largestRotation,
  tolerance.largestGain,
  error.serAllPairs,
  bits.serLower,
  bits.serDirectional,
  bits.berExact,
  bits.berAllPairs,
  bits.berNearest,
  bits.frameErrorRate,
  information.mutualInformation,
  information.bitMetricRate,
  information.thresholdMutualInformation,
  information.thresholdBitMetric,
  label.labelling,
  label.labels,
  label.probabilityRule,
  label.shapedEntropy,
  label.probabilities,
  label.decision,
  tolerance.serMap,
  tolerance.mapOutside,
  tolerance.mapVanished,
  channel.channel,
  channel.ricianK,
  channel.nakagamiM,
  channel.branches,
  channel.phaseError,
  channel.frameSymbols,
  dimension.lattice,
  dimension.offset,
  dimension.factors,
  signal.normalisation,
  signal.spacing,
  signal.points,
  signal.meanEnergy,
  signal.peakEnergy,
  signal.signalDistance,
]

const byId = new Map(columns.map(column => [column.id, column]))

/** The column of an id; undefined for one that does not exist, such as from an older saved set. */
export const columnOf = (id: string): Column | undefined => byId.get(id)
