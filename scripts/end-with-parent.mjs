/**
 * Preloaded into the server (`node --import`): when the process that started it is gone, even by `kill -9`, the server closes too,
 * and so does not keep the port from the next start.
 */
if (process.channel) {
  process.channel.unref()
  process.once('disconnect', () => {
    process.kill(process.pid, 'SIGTERM')
    setTimeout(() => process.exit(1), 20_000).unref()
  })
}
