import { NothingHere } from '@/components/layout/nothing-here';
import { paths } from '@/lib/paths';

export default function NotFound() {
  return (
    <main>
      <NothingHere back={{ href: paths.home(), label: 'To the front page' }} />
    </main>
  );
}
