import { Navigate } from 'react-router-dom';
import { useSession } from './session-context.ts';

/** A technician starts on the rounds, the others on the jobs. */
export function FirstPage() {
  const { person } = useSession();
  return <Navigate to={person.role === 'technician' ? '/rounds' : '/jobs'} replace />;
}
