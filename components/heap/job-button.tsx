'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import type { JobTarget } from './job-target';

const JobDialog = dynamic(() => import('./job-dialog').then((module) => module.JobDialog));

export function JobButton(target: JobTarget) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)} aria-haspopup="dialog">
        Another job …
      </Button>
      {isOpen ? <JobDialog {...target} onClose={() => setOpen(false)} /> : null}
    </>
  );
}
