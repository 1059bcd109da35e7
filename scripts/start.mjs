#!/usr/bin/env node
// npm start: everything from a fresh checkout to the address of the pages. Plain Node: it runs before any package is there.
//   PORT  DATABASE_URL  DATA_DIR  DEMO_PASSWORD  YARD=off  CLOCK_RATE        also HOST  PUBLIC_URL  TRUST_PROXY=on  SMTP_URL  BUS_HOSTS
import { giveUp } from './say.mjs';
import { start } from './start/run.mjs';

start().catch(giveUp);
