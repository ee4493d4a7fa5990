import { NothingHere } from '@/components/layout/nothing-here';
import { paths } from '@/lib/paths';

export default function ProjectNotFound() {
  return <NothingHere back={{ href: paths.projects(), label: 'To the projects' }} />;
}
