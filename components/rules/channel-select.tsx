import { Select } from '@/components/ui/field';
import type { Channel } from '@/lib/schema/yard-view';

/** Which channel a rule shall run; empty until one is chosen. */
export function ChannelSelect({
  label,
  value,
  error,
  channels,
  onChoose,
}: {
  label: string;
  value: string;
  error: string | undefined;
  channels: Pick<Channel, 'key' | 'number' | 'label'>[];
  onChoose: (key: string) => void;
}) {
  return (
    <Select {...{ label, value, error }} onChange={(event) => onChoose(event.target.value)}>
      <option value="">Choose …</option>
      {channels.map((one) => (
        <option key={one.key} value={one.key}>
          {one.number} · {one.label}
        </option>
      ))}
    </Select>
  );
}
