#!/usr/bin/env node
import { argv } from 'node:process';
import { runCommandLine } from './program.ts';

await runCommandLine(argv.slice(2));
