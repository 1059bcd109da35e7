// A board on Modbus TCP, a process of its own: four relays, some registers, and a watchdog if asked for.
//   node board.mjs PORT [WATCHDOG_REGISTER WITHIN_MS]
// Its parent sets what it holds, and asks for it, by messages.
import modbus from 'modbus-serial';

const [port, watchdogRegister, withinMs] = process.argv.slice(2).map(Number);
const LAST = 199;
const state = {
  coils: Array(LAST + 1).fill(false),
  discrete: Array(LAST + 1).fill(false),
  input: Array(LAST + 1).fill(0),
  holding: Array(LAST + 1).fill(0),
  /** Coil addresses that it refuses to write. */
  refuses: [],
  /** Every write of a coil, in order. */
  writes: [],
  feeds: 0,
  /** Registers that somebody has asked for. */
  reads: 0,
};

/** Illegal data address: exception 2 by the protocol's section 7. */
function at(list, address) {
  if (address > LAST) throw Object.assign(new Error('no such address'), { modbusErrorCode: 2 });
  return list[address];
}

let watchdog;
function feed() {
  clearTimeout(watchdog);
  watchdog = setTimeout(() => state.coils.fill(false), withinMs);
}

const server = new modbus.ServerTCP(
  {
    getCoil: (address) => at(state.coils, address),
    getDiscreteInput: (address) => at(state.discrete, address),
    getInputRegister: (address) => {
      state.reads += 1;
      return at(state.input, address);
    },
    getHoldingRegister: (address) => at(state.holding, address),
    setCoil: (address, isOn) => {
      at(state.coils, address);
      if (state.refuses.includes(address)) throw Object.assign(new Error('stuck'), { modbusErrorCode: 4 });
      state.writes.push([address, isOn]);
      state.coils[address] = isOn;
    },
    setRegister: (address, value) => {
      at(state.holding, address);
      state.holding[address] = value;
      if (address !== watchdogRegister) return;
      state.feeds += 1;
      feed();
    },
  },
  { host: '127.0.0.1', port, unitID: 1 },
);
server.on('socketError', () => undefined);
server.on('initialized', () => process.send({ ready: true }));
process.on('message', ({ set, get }) => {
  for (const [list, address, value] of set ?? []) {
    if (list === 'refuses') state.refuses = value;
    else state[list][address] = value;
  }
  if (get) process.send({ state });
});
process.on('disconnect', () => process.exit(0));
