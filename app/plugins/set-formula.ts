import { SetFormula } from '~/utils/methods/set-formula'

/** Formulas that the server has set stand in the page already; their HTML need not come a second time. */
export default definePayloadPlugin(() => {
  definePayloadReducer('SetFormula', value => value instanceof SetFormula)
  definePayloadReviver('SetFormula', () => new SetFormula(null))
})
