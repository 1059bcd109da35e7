import type { HouseState } from '@/lib/schema/house-state';
import type { WiringStanding } from '@/lib/wording/wiring';
import type { Yard } from './forms/options';
import type { canFallback } from './node-status';

/** What of a house's wiring its first sentence tells. */
export function standingOf(
  { nodes, points, channels, lockouts }: Yard,
  can: ReturnType<typeof canFallback>,
  state: HouseState | null,
): WiringStanding {
  const isLocked = (key: string) => lockouts.some((one) => one.channel === key && one.removedAt === null);
  return {
    nodes: nodes.map((node) => ({
      key: node.key,
      lastHeardAt: node.lastHeardAt === null ? null : Date.parse(node.lastHeardAt),
      isRevoked: node.revokedAt !== null,
      ...(node.kind === 'modbus' ? { board: { watchdogS: node.modbus?.watchdog?.within ?? null } } : {}),
      keeps: channels
        .filter((one) => one.node === node.key && one.fallback !== null && can[node.key] === 'can')
        .map((one) => one.label),
    })),
    points: points.map((point) => ({
      name: point.name,
      isGood: state?.points.find((one) => one.key === point.key)?.quality === 'good',
    })),
    channels: channels.map((channel) => ({
      number: channel.number,
      label: channel.label,
      isProved: channel.provedAt !== null,
      isLockedOut: isLocked(channel.key),
    })),
  };
}
