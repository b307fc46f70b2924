// Loaded first into every process that `npm start` starts: when the parent is gone, so is the channel to it.
process.channel?.unref();
process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'));
