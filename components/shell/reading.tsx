'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Segmented } from '@/components/ui/segmented';
import { send } from '@/components/ui/send';
import type { Preferences } from '@/lib/units/preferences';

export type ThemeChoice = 'system' | 'light' | 'dark';

/** How this reader wants to read. Each choice acts at once; the server renders the page anew in it. */
export function Reading({ preferences, theme }: { preferences: Preferences; theme: ThemeChoice }) {
  const router = useRouter();
  const [failure, setFailure] = useState<string | null>(null);

  async function choose(
    change: Partial<Omit<Preferences, 'clock'>> & { clock?: 24 | 12; theme?: ThemeChoice },
  ) {
    const answer = await send('PUT', '/preferences', change);
    setFailure(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    // the attribute stands on <html>, which a refresh of the page's data does not touch
    if (change.theme === 'system') document.documentElement.removeAttribute('data-theme');
    else if (change.theme !== undefined) document.documentElement.dataset.theme = change.theme;
    router.refresh();
  }

  return (
    <div className="flex flex-col items-start gap-2">
      <Segmented
        label="Theme"
        value={theme}
        options={[
          { value: 'system', label: 'Auto' },
          { value: 'light', label: 'Light' },
          { value: 'dark', label: 'Dark' },
        ]}
        onChoose={(value) => void choose({ theme: value })}
      />
      <div className="flex flex-wrap gap-2">
        <Segmented
          label="Temperature"
          value={preferences.temperature}
          options={[
            { value: 'C', label: '°C' },
            { value: 'F', label: '°F' },
          ]}
          onChoose={(value) => void choose({ temperature: value })}
        />
        <Segmented
          label="Clock"
          value={preferences.clock === 24 ? '24' : '12'}
          options={[
            { value: '24', label: '24 h' },
            { value: '12', label: '12 h' },
          ]}
          onChoose={(value) => void choose({ clock: value === '24' ? 24 : 12 })}
        />
        <Segmented
          label="Air flow"
          value={preferences.flow}
          options={[
            { value: 'L/s', label: 'L/s' },
            { value: 'cfm', label: 'cfm' },
          ]}
          onChoose={(value) => void choose({ flow: value })}
        />
        <Segmented
          label="Length"
          value={preferences.length}
          options={[
            { value: 'm', label: 'm' },
            { value: 'ft', label: 'ft' },
          ]}
          onChoose={(value) => void choose({ length: value })}
        />
      </div>
      <p role="alert" className="text-[0.9rem] font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
