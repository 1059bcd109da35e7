import { ButtonLink } from '@/components/ui/button';
import { Empty } from '@/components/ui/states';

export const metadata = { title: 'Not found' };

export default function NotFound() {
  return (
    <div className="mx-auto max-w-2xl p-4 pt-16">
      <h1 className="sr-only">Not found</h1>
      <Empty
        title="There is no such page here."
        action={
          <ButtonLink href="/" kind="primary">
            Go to Watch
          </ButtonLink>
        }
      >
        The house or page may have been renamed or taken out of use, or it belongs to another holding. Control
        goes on as before.
      </Empty>
    </div>
  );
}
