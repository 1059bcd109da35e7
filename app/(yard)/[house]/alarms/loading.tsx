import { PageLoading } from '@/components/ui/page-loading';

export default function AlarmsLoading() {
  return <PageLoading what="the alarms" />;
}
