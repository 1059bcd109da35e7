'use client';
import { PageFailed } from '@/components/shell/page-failed';

export default function PageError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <main className="p-4">
      <PageFailed digest={error.digest} retry={reset} />
    </main>
  );
}
