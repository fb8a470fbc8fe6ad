import { useDatabase } from '../../../../database/client'
import { sweepsOf } from '../../../../services/sweep-rows'
import { studyOf } from '../../../../utils/caller'

/** GET /api/studies/:id/sweeps: the study's sweeps, the newest first. */
export default defineEventHandler(async event => ({ items: await sweepsOf(useDatabase(), studyOf(event).id), next: null }))
