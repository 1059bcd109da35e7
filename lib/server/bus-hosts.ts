/** Which boards and brokers may be connected to: the operator's list decides, whatever a form or an archive says. */
import { env, type BusHost } from './env';

/** Exactly as it stands in the list: names are not looked up, so a name is not let in by the address behind it. */
export function mayReach(
  { host, port }: { host: string; port: number },
  list: readonly BusHost[] = env().BUS_HOSTS,
): boolean {
  const asked = host.toLowerCase();
  return list.some((one) => one.host === asked && (one.port === null || one.port === port));
}

/** What stands at the field of a host that is not on the list. */
export function notOnList({ host, port }: { host: string; port: number }): string {
  const entry = host.includes(':') ? `[${host}]:${port}` : `${host}:${port}`;
  return `${entry} is not on the list of boards and brokers that this program may connect to. Who runs it adds it to BUS_HOSTS.`;
}
