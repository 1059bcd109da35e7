#!/usr/bin/env node
// npm run demo:night: the whole chain, from the yard's weather to the screen, at sixty times real speed: a night in 24 minutes.
// It keeps its own data folder, since one folder keeps one clock, and begins in the evening.
import { giveUp } from './say.mjs';
import { start } from './start/run.mjs';

const env = { ...process.env };
env.CLOCK_RATE ||= '60';
env.DATA_DIR ||= '.data-night';
start(env, { usualPort: 3060, seedArguments: ['--evening'] }).catch(giveUp);
