import { v7 } from 'uuid'

/** A new identifier: a UUID, version 7, so that ids sort by creation. */
export const newId = (): string => v7()
