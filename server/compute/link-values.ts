import { decibels, lowOf, mapEstimate } from '#shared/modulation'
import type { Estimate } from '#shared/modulation'
import { availableEsN0Db, marginDb, receiverThreshold, surplusDb } from '#shared/modulation/link'
import type { CandidateValues } from '#shared/schemas/values'
import { requiredMarginOf } from '#shared/study/canonical-study'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'

export type LinkValues = Pick<CandidateValues, 'cases' | 'decidingCase' | 'availableEsN0Db' | 'requiredMarginDb' | 'receiverThresholdDbm'>
  & { marginDb: Estimate, surplusDb: Estimate }

/** What the link needs to know of a row. */
export interface RowAtLink {
  requiredEsN0Db: Estimate
  /** what the amplifier must be backed off by, where peak power is the limit; dB */
  backOffDb: number
  symbolRateHz: number
  /** Es in signal units squared; an entered scheme counts as unit mean energy */
  meanEnergy: number
}

/**
 * Available Es/N0, margin and surplus, of each link case and of the one that decides: the one with the worst surplus.
 * Where the study gives N0, the points are the transmitted signal: their own energy counts, and no back-off.
 * @see methods §7
 */
export function linkValues({ study, implementationLossDb }: CanonicalInputs, row: RowAtLink): LinkValues {
  const { available } = study
  const backOffDb = study.limitedBy === 'peakPower' ? row.backOffDb : 0
  const marginAt = (esN0Db: number) => mapEstimate(row.requiredEsN0Db, required => marginDb(esN0Db, required, implementationLossDb))
  if (available.from !== 'link') {
    const esN0Db = available.from === 'entered' ? available.esN0Db - backOffDb : decibels(row.meanEnergy / available.n0)
    const margin = marginAt(esN0Db)
    const requiredMarginDb = requiredMarginOf(study)
    return {
      cases: [], decidingCase: null, availableEsN0Db: esN0Db, marginDb: margin, requiredMarginDb,
      surplusDb: mapEstimate(margin, db => surplusDb(db, requiredMarginDb)), receiverThresholdDbm: null,
    }
  }
  const cases = available.cases.map(({ id, name, requiredMarginDb, cOverN0DbHz }) => {
    const esN0Db = availableEsN0Db(cOverN0DbHz, row.symbolRateHz, backOffDb)
    const margin = marginAt(esN0Db)
    return { id, name, availableEsN0Db: esN0Db, marginDb: margin, requiredMarginDb, surplusDb: mapEstimate(margin, db => surplusDb(db, requiredMarginDb)) }
  })
  const worst = cases.reduce((least, one) => lowOf(one.surplusDb) < lowOf(least.surplusDb) ? one : least)
  const { noiseDensityDbmHz } = available.cases[cases.indexOf(worst)]!
  return {
    cases, decidingCase: worst.name, availableEsN0Db: worst.availableEsN0Db,
    marginDb: worst.marginDb, requiredMarginDb: worst.requiredMarginDb, surplusDb: worst.surplusDb,
    receiverThresholdDbm: mapEstimate(row.requiredEsN0Db, db => receiverThreshold(noiseDensityDbmHz, row.symbolRateHz, db, implementationLossDb)),
  }
}
