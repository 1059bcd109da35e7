export function compressTexts(folder: string): Promise<void>;
