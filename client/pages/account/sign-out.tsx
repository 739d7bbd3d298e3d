import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { useSignOut } from '../../api/session.ts';
import { Key } from '../../components/key.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed } from '../../components/waiting.tsx';
import { useUnsent } from '../../device/this-device.ts';
import { UnsentSlip } from './unsent-slip.tsx';

/** Stopped while something of this person is on this device alone. */
export function SignOut() {
  const signOut = useSignOut();
  const navigate = useNavigate();
  const { unsent, conflict, refused } = useUnsent();
  const [isStopped, setIsStopped] = useState(false);
  const leave = () => signOut.mutate(undefined, { onSuccess: () => void navigate('/sign-in') });
  return (
    <section>
      <SectionHead>Sign out</SectionHead>
      {signOut.isError && <Failed error={signOut.error} />}
      <div className="pt-3">
        <Key
          disabled={signOut.isPending}
          onClick={() => (unsent + conflict + refused > 0 ? setIsStopped(true) : leave())}
        >
          Sign out on this device
        </Key>
      </div>
      {isStopped && <UnsentSlip onLeave={leave} onBack={() => setIsStopped(false)} />}
    </section>
  );
}
