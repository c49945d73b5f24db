import { runProgram } from './program';

process.exitCode = await runProgram(process.argv.slice(2), process.env);
