import { NothingHere } from '../../components/nothing-here.tsx';

export function NotFoundPage() {
  return <NothingHere />;
}
