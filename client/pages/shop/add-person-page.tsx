import { useNavigate } from 'react-router-dom';
import { newPersonSchema, ROLES, type Role } from '#shared/schemas/people.ts';
import { useAddPerson } from '../../api/people.ts';
import { Crumb } from '../../components/crumb.tsx';
import { Cells, PickField, TextField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';

const ROLE_OPTIONS = ROLES.map((role) => ({ value: role, words: role }));

export function AddPersonPage() {
  const addPerson = useAddPerson();
  const navigate = useNavigate();
  const form = useCheckedForm({
    schema: newPersonSchema,
    defaultValues: { name: '', email: '', role: 'technician' as Role, password: '' },
    save: async (person) => {
      await addPerson.mutateAsync(person);
      await navigate('/shop');
    },
  });
  const { register, fault } = form;
  return (
    <DeskPage>
      <FormHead
        form={form}
        title="Add a person"
        above={<Crumb to="/shop">Shop</Crumb>}
        lead="Tell them the first password yourself; they can change it once they are in."
      />
      <FormFrame form={form} doer="Add the person" leave="/shop">
        <Cells>
          <TextField label="Name" {...register('name')} error={fault('name')} autoComplete="off" />
          <TextField
            label="E-mail, which they sign in with"
            type="email"
            {...register('email')}
            error={fault('email')}
            autoComplete="off"
          />
          <PickField
            label="Role"
            options={ROLE_OPTIONS}
            {...register('role')}
            error={fault('role')}
          />
          <TextField
            label="First password"
            type="password"
            {...register('password')}
            error={fault('password')}
            hint="At least 12 characters; three odd words are better than one with signs in it."
            autoComplete="new-password"
          />
        </Cells>
      </FormFrame>
    </DeskPage>
  );
}
