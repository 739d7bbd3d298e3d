import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState, type SubmitEvent } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import type { SignIn } from '#shared/schemas/people.ts';
import { shopCardQuery, useSignIn } from '../../api/sign-in.ts';
import { ErrorSummary, type FormProblem } from '../../components/error-summary.tsx';
import { Cells, TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { FuseMark } from '../../components/signs.tsx';
import { ThemeWord } from '../../components/theme-word.tsx';
import { OpeningStrip } from './opening-strip.tsx';

/** By hand and in the words of the shared schema, which would be half of what this page has to load. */
function problemsIn({ email, password }: SignIn): FormProblem[] {
  const problems: FormProblem[] = [];
  if (email === '') problems.push({ name: 'email', message: 'Enter your e-mail address' });
  if (password === '') problems.push({ name: 'password', message: 'Enter your password' });
  return problems;
}

/** Where they were before; only a path of our own. */
function wayBack(to: string | null) {
  return to !== null && /^\/(?![/\\])/.test(to) ? to : '/';
}

function useSignInForm() {
  const signIn = useSignIn();
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const [problems, setProblems] = useState<FormProblem[]>([]);
  const [attempt, setAttempt] = useState(0);

  function show(found: FormProblem[]) {
    setProblems(found);
    setAttempt((before) => before + 1);
  }

  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const typed = {
      email: String(form.get('email') ?? '').trim(),
      password: String(form.get('password') ?? ''),
    };
    const found = problemsIn(typed);
    if (found.length > 0) return show(found);
    setProblems([]);
    signIn.mutate(typed, {
      onSuccess: () => {
        queryClient.clear();
        void navigate(wayBack(search.get('to')), { replace: true });
      },
      onError: (error) => show([{ name: null, message: error.message }]),
    });
  }

  return { handleSubmit, problems, attempt, isBusy: signIn.isPending };
}

export function SignInPage() {
  const { handleSubmit, problems, attempt, isBusy } = useSignInForm();
  const faultOf = (name: string) => problems.find((problem) => problem.name === name)?.message;

  return (
    <main id="main">
      <OpeningStrip />
      <div className="mx-auto flex max-w-[1440px] items-center justify-between pt-2 pr-2 pl-4 desk:px-[84px] desk:pt-10">
        <p className="inline-flex items-center gap-3 font-gothic text-[1.3125rem] leading-none font-semibold font-stretch-[112%] desk:text-[1.625rem]">
          <FuseMark className="w-[51px]" />
          Fusekeeper
        </p>
        <ThemeWord />
      </div>
      <div className="mx-auto grid max-w-[1440px] grid-cols-[minmax(0,1fr)] items-start gap-[22px] px-4 pb-8 desk:grid-cols-[minmax(0,1fr)_minmax(0,440px)] desk:gap-x-16 desk:px-[84px] desk:pt-2 desk:pb-16 wide:gap-x-24">
        <PageHeading
          title="Sign in"
          hasErrors={problems.length > 0}
          className="max-w-[15em] pt-3.5 desk:pt-4 wide:text-opening"
        >
          Watch the heat cut out and come back before you close the lid.
        </PageHeading>
        <form onSubmit={handleSubmit} noValidate className="grid gap-4 desk:pt-4">
          <div className="empty:hidden *:mb-0">
            <ErrorSummary problems={problems} attempt={attempt} />
          </div>
          <Cells>
            <TextField
              label="E-mail"
              name="email"
              type="email"
              autoComplete="username"
              error={faultOf('email')}
            />
            <TextField
              label="Password"
              name="password"
              type="password"
              autoComplete="current-password"
              error={faultOf('password')}
            />
          </Cells>
          <Key type="submit" face="main" size="site" disabled={isBusy}>
            {isBusy ? 'Signing in…' : 'Sign in'}
          </Key>
          <ShopLine />
        </form>
      </div>
    </main>
  );
}

function ShopLine() {
  const { data: card } = useQuery(shopCardQuery());
  const shop = [card?.name, card?.town].filter(Boolean).join(', ');
  return (
    <p className="min-h-[2.9em] text-small text-print">
      {shop && `${shop}. `}
      Customers need no account: the link that the shop sends opens their page.
    </p>
  );
}
