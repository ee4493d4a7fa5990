import { NothingHere } from '@/components/layout/nothing-here';
import { paths } from '@/lib/paths';

export default function PracticeNotFound() {
  return <NothingHere back={{ href: paths.desk(), label: 'To the desk' }} />;
}
