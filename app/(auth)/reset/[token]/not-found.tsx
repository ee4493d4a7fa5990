import { NothingHere } from '@/components/layout/nothing-here';
import { paths } from '@/lib/paths';

export default function TokenNotFound() {
  return <NothingHere title="This link leads nowhere" back={{ href: paths.signIn(), label: 'To sign-in' }} />;
}
