'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';

const JobDialog = dynamic(() => import('./job-dialog').then((module) => module.JobDialog));

export interface JobTarget {
  house: string;
  heap: string;
  today: string;
}

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
