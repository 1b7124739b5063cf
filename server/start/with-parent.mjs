// Loaded into the server before anything else. Should whoever started it be killed, nobody would be left
// to stop it: the channel between them closes, and it drains and goes by itself.
process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'))
process.channel?.unref()
