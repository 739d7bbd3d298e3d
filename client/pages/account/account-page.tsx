import { useState } from 'react';
import { passwordChangeSchema } from '#shared/schemas/people.ts';
import { useChangePassword } from '../../api/session.ts';
import { Cells, TextField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { useSession } from '../frame/session-context.ts';
import { SignOut } from './sign-out.tsx';

export function AccountPage() {
  const { person } = useSession();
  const form = usePasswordForm();
  return (
    <DeskPage>
      <FormHead form={form} title={person.name} lead={`${person.email}, ${person.role}.`} />
      <div className="grid max-w-form grid-cols-[minmax(0,1fr)] gap-11">
        <PasswordForm form={form} email={person.email} />
        <SignOut />
      </div>
    </DeskPage>
  );
}

const BLANK = { current: '', next: '' };

function usePasswordForm() {
  const changePassword = useChangePassword();
  const [isChanged, setIsChanged] = useState(false);
  const form = useCheckedForm({
    schema: passwordChangeSchema,
    defaultValues: BLANK,
    save: async (change) => {
      setIsChanged(false);
      await changePassword.mutateAsync(change);
      form.reset(BLANK);
      setIsChanged(true);
    },
  });
  return { ...form, isChanged };
}

type PasswordFormProps = { form: ReturnType<typeof usePasswordForm>; email: string };

function PasswordForm({ form, email }: PasswordFormProps) {
  const { register, fault } = form;
  return (
    <section>
      <SectionHead>Change the password</SectionHead>
      <form onSubmit={form.handleSubmit} noValidate className="pt-3">
        {/* For password managers, which keep a password under a name. */}
        <input type="email" autoComplete="username" value={email} readOnly hidden />
        <Cells>
          <TextField
            label="Present password"
            type="password"
            autoComplete="current-password"
            {...register('current')}
            error={fault('current')}
          />
          <TextField
            label="New password"
            type="password"
            autoComplete="new-password"
            hint="At least 12 characters; three odd words are better than one with signs in it."
            {...register('next')}
            error={fault('next')}
          />
        </Cells>
        <div className="pt-4">
          <Key type="submit" face="main" disabled={form.isSaving}>
            {form.isSaving ? 'Changing…' : 'Change the password'}
          </Key>
        </div>
      </form>
      {form.isChanged && (
        <Notice kind="done" role="status" head="The password is changed." className="mt-5">
          You were signed out wherever else you were signed in.
        </Notice>
      )}
    </section>
  );
}
