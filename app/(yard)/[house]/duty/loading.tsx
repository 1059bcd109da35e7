import { PageLoading } from '@/components/ui/page-loading';

export default function DutyLoading() {
  return <PageLoading what="the nights" />;
}
