'use client';
import { useRouter } from 'next/navigation';
import { startTransition } from 'react';
import { PageFailed } from '@/components/shell/page-failed';

export default function PageError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  const router = useRouter();
  // reset alone would render the same failed answer again
  const retry = () =>
    startTransition(() => {
      router.refresh();
      reset();
    });
  return <PageFailed digest={error.digest} retry={retry} />;
}
