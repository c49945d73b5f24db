import { runProgram } from './program';

// Whoever reads the answer may have seen enough, such as `head`: that is no fault of the command.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
});

process.exitCode = await runProgram(process.argv.slice(2), process.env);
