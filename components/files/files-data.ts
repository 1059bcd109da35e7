import type { Preferences } from '@/lib/units/preferences';

export interface FilesHouse {
  slug: string;
  name: string;
  zone: string;
}

export interface FilesPoint {
  key: string;
  name: string;
  unit: string;
}

/** What times and figures are told by. */
export interface FilesScene {
  house: FilesHouse;
  preferences: Preferences;
}

export const megabytes = (bytes: number) =>
  bytes < 100_000 ? `${Math.ceil(bytes / 1000)} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`;
