import type { Operation } from '../operation';
import * as archives from './archives';
import * as buses from './buses';
import * as files from './files';
import * as heap from './heap';
import * as heapYear from './heap-year';
import * as money from './money';
import * as open from './open';
import * as people from './people';
import * as points from './points';
import * as proofs from './proofs';
import * as record from './record';
import * as rules from './rules';
import * as running from './running';
import * as training from './training';
import * as setup from './setup';
import * as vents from './vents';
import * as wiring from './wiring';
import * as yard from './yard';

/** Every route of the interface; a test holds it equal to the route files. */
export const OPERATIONS: readonly Operation[] = [
  yard,
  wiring,
  vents,
  training,
  buses,
  setup,
  points,
  running,
  rules,
  record,
  heap,
  heapYear,
  files,
  archives,
  money,
  people,
  proofs,
  open,
].flatMap((subject) => Object.values<Operation>(subject));
