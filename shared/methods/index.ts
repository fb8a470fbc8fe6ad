/**
 * The methods: one source of truth for the Methods page and for what columns say of themselves.
 * A new method is an entry in the file of its subject; a column names the one that it rests on.
 */
import { bitError } from './bit-error'
import { channels } from './channels'
import { families } from './families'
import { geometry } from './geometry'
import { information } from './information'
import { link } from './link'
import { model } from './model'
import { requiredSnr } from './required-snr'
import { symbolError } from './symbol-error'
import type { Method } from './method'

export { sections } from './method'
export type { Formula, Method } from './method'
export { sources } from './sources'
export type { SourceId } from './sources'
export { tolerances } from './tolerances'

const all = {
  ...model, ...geometry, ...symbolError, ...bitError, ...requiredSnr, ...information, ...channels, ...link, ...families,
}

export type MethodId = keyof typeof all

/** Every method by its id, in the order of the page. */
export const methods: Readonly<Record<MethodId, Method>> = all

/** Ids of the methods, in the order of the page. */
export const methodIds = Object.keys(all) as MethodId[]
