/**
 * Loaded before the server and the worker by the start command: when that one is killed, the channel to it closes,
 * and they end in order instead of living on with nobody to stop them.
 */
process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'))
process.channel?.unref()
