import { closePool } from '../compute/pool'
import { databaseReady } from '../database/ready'
import { keepLooking, recover } from '../services/recovery'

/** Once the database answers, takes up the computations that an ended server left behind; ends the workers at the close. */
export default defineNitroPlugin((nitro) => {
  const stop = keepLooking()
  databaseReady().then(recover).catch((error: unknown) => console.error('Computations could not be taken up again; the next look tries.', error))
  nitro.hooks.hook('close', async () => {
    stop()
    await closePool()
  })
})
