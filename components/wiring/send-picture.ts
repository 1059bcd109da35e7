const MOST_BYTES = 10 * 1024 ** 2;

/** Sends a picture's bytes to the interface. @returns in words why it was not taken; null where it was */
export async function sendPicture(path: string, file: File): Promise<string | null> {
  if (file.size > MOST_BYTES) return `${file.name} is over 10 MB.`;
  let response: Response;
  try {
    response = await fetch(`/api/v1${path}`, {
      method: 'POST',
      headers: { 'content-type': file.type, accept: 'application/json' },
      body: file,
    });
  } catch {
    return 'The server does not answer, so the picture was not sent. Choose it again in a minute.';
  }
  if (response.ok) return null;
  const problem = (await response.json().catch(() => ({}))) as {
    detail?: string;
    errors?: { message: string }[];
  };
  return problem.errors?.[0]?.message ?? problem.detail ?? 'The server did not take the picture.';
}
