/** The queue lives in the database, so its adapter stands under server/db, where the worker may reach it too. */
export { createBoss, MAINTENANCE_S, QUEUE_OPTIONS, sendJob } from '../db/queue.ts'
