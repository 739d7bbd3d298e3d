import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState, type SubmitEvent } from 'react';
import { SIGNED_OUT_EVENT } from '../../api/query-client.ts';
import { useSignIn } from '../../api/sign-in.ts';
import { Cells, TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { useModal } from '../../components/use-modal.ts';

/**
 * Where the server no longer knows who this is (signed out elsewhere, idle too long), a slip asks for the password
 * over the page. The page under it stays as it was, with everything typed into it.
 */
export function SignInAgain({ email }: { email: string }) {
  const [isAsked, setIsAsked] = useState(false);
  useEffect(() => {
    const ask = () => setIsAsked(true);
    window.addEventListener(SIGNED_OUT_EVENT, ask);
    return () => window.removeEventListener(SIGNED_OUT_EVENT, ask);
  }, []);
  return isAsked ? <SignInSlip email={email} onSignedIn={() => setIsAsked(false)} /> : null;
}

function SignInSlip({ email, onSignedIn }: { email: string; onSignedIn: () => void }) {
  const queryClient = useQueryClient();
  const signIn = useSignIn();
  const modal = useModal('input[type=password]');

  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const password = String(new FormData(event.currentTarget).get('again-password') ?? '');
    signIn.mutate(
      { email, password },
      {
        onSuccess: () => {
          onSignedIn();
          void queryClient.invalidateQueries();
        },
      },
    );
  }

  return (
    <dialog
      ref={modal}
      aria-labelledby="sign-in-again"
      onCancel={(event) => event.preventDefault()}
      className="mx-auto mt-auto mb-0 w-full max-w-site border-t-slip border-ink bg-deck px-4 py-5 text-ink backdrop:bg-ink/40 desk:my-auto"
    >
      <h2 id="sign-in-again" className="font-serif text-finding">
        You were signed out. Sign in to go on.
      </h2>
      <p className="pt-2 pb-3.5 text-say">What you typed is still here, under this slip.</p>
      <form onSubmit={handleSubmit} noValidate className="grid gap-3">
        <Cells>
          <TextField
            label="E-mail"
            name="again-email"
            value={email}
            readOnly
            autoComplete="username"
          />
          <TextField
            label="Password"
            name="again-password"
            type="password"
            autoComplete="current-password"
            error={signIn.error?.message}
          />
        </Cells>
        <div className="grid grid-cols-2 gap-[10px]">
          <Key type="submit" face="main" size="site" disabled={signIn.isPending}>
            {signIn.isPending ? 'Signing in…' : 'Sign in'}
          </Key>
          <Key size="site" onClick={() => window.location.assign('/sign-in')}>
            Someone else
          </Key>
        </div>
      </form>
    </dialog>
  );
}
