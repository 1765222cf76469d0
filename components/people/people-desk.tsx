'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { CheckBox, TextInput } from '@/components/ui/field';
import { errorOf, FormFailure, useZodForm } from '@/components/ui/form';
import { Notice, Sheet } from '@/components/ui/sheet';
import { addPerson, changePerson, removePerson } from '@/lib/people/actions';
import {
  type MemberForm,
  memberForm,
  type MemberEditForm,
  memberEditForm,
  ROLE_NAMES,
} from '@/lib/people/schema';

interface Member extends MemberForm {
  id: string;
  version: number;
}

const ROLES: Record<(typeof ROLE_NAMES)[number], string> = {
  owner: 'Owner',
  estimator: 'Estimator',
  office: 'Office',
  crew: 'Crew',
};

type RoleForm = Pick<MemberForm, 'roles'>;

/** Roles as tick boxes: one person may hold several. */
function RolesField({
  id,
  value,
  error,
  onChange,
}: {
  id: string;
  value: RoleForm['roles'];
  error: string | undefined;
  onChange: (roles: RoleForm['roles']) => void;
}) {
  return (
    <fieldset aria-describedby={error ? `${id}-roles-error` : undefined}>
      <legend className="text-[0.95rem]">Roles</legend>
      <div className="flex flex-wrap gap-x-6">
        {ROLE_NAMES.map((role) => (
          <CheckBox
            key={role}
            id={`${id}-${role}`}
            label={ROLES[role]}
            checked={value.includes(role)}
            onChange={(event) =>
              onChange(event.target.checked ? [...value, role] : value.filter((one) => one !== role))
            }
          />
        ))}
      </div>
      {error ? (
        <p id={`${id}-roles-error`} className="text-sm font-bold text-danger">
          {error}
        </p>
      ) : null}
    </fieldset>
  );
}

function AddPerson({ shopId }: { shopId: string }) {
  const router = useRouter();
  const empty: MemberForm = {
    name: '',
    email: '',
    roles: ['crew'],
    licenceNumber: '',
    mainsQualified: false,
  };
  const { form, submit, pending, failure, done } = useZodForm<MemberForm, { id: string }>({
    schema: memberForm,
    defaultValues: empty,
    action: (values, meta) => addPerson(shopId, values, meta),
    onDone: () => {
      form.reset(empty);
      router.refresh();
    },
  });
  const roles = useWatch({ control: form.control, name: 'roles' });
  return (
    <Sheet title="Add a person">
      <form onSubmit={submit} noValidate className="flex flex-col gap-4">
        <FormFailure failure={failure} />
        {done ? (
          <Notice kind="done" title="Added. They set their password by “Forgotten password”." role="status" />
        ) : null}
        <TextInput id="new-name" label="Name" error={errorOf(form, 'name')} {...form.register('name')} />
        <TextInput
          id="new-email"
          label="E-mail"
          type="email"
          error={errorOf(form, 'email')}
          {...form.register('email')}
        />
        <RolesField
          id="new"
          value={roles}
          error={errorOf(form, 'roles')}
          onChange={(next) => form.setValue('roles', next, { shouldValidate: true })}
        />
        <TextInput
          id="new-licence"
          label="Licence number"
          hint="Who has one on file may let a soft stop stand."
          error={errorOf(form, 'licenceNumber')}
          {...form.register('licenceNumber')}
        />
        <CheckBox
          id="new-mains"
          label="Qualified for readings on the mains side"
          {...form.register('mainsQualified')}
        />
        <Button type="submit" pending={pending}>
          Add
        </Button>
      </form>
    </Sheet>
  );
}

function EditPerson({ shopId, member, onDone }: { shopId: string; member: Member; onDone: () => void }) {
  const { form, submit, pending, failure } = useZodForm<MemberEditForm, { version: number }>({
    schema: memberEditForm,
    defaultValues: {
      id: member.id,
      baseVersion: member.version,
      name: member.name,
      roles: member.roles,
      licenceNumber: member.licenceNumber,
      mainsQualified: member.mainsQualified,
    },
    action: (values, meta) => changePerson(shopId, values, meta),
    onDone,
  });
  const roles = useWatch({ control: form.control, name: 'roles' });
  return (
    <form onSubmit={submit} noValidate className="mt-3 flex flex-col gap-4">
      <FormFailure failure={failure}>
        {failure?.code === 'conflict' ? (
          <p>Reload the page to see what the other person saved; yours is still in this form.</p>
        ) : null}
      </FormFailure>
      <TextInput
        id={`${member.id}-name`}
        label="Name"
        error={errorOf(form, 'name')}
        {...form.register('name')}
      />
      <RolesField
        id={member.id}
        value={roles}
        error={errorOf(form, 'roles')}
        onChange={(next) => form.setValue('roles', next, { shouldValidate: true })}
      />
      <TextInput
        id={`${member.id}-licence`}
        label="Licence number"
        error={errorOf(form, 'licenceNumber')}
        {...form.register('licenceNumber')}
      />
      <CheckBox
        id={`${member.id}-mains`}
        label="Qualified for readings on the mains side"
        {...form.register('mainsQualified')}
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" pending={pending}>
          Save
        </Button>
        <Button look="secondary" onClick={onDone}>
          Leave it
        </Button>
      </div>
    </form>
  );
}

function MemberRow({ shopId, member, self }: { shopId: string; member: Member; self: boolean }) {
  const router = useRouter();
  const [editing, setEditing] = useState(false);
  const [said, setSaid] = useState('');
  const remove = async () => {
    if (!window.confirm(`Take ${member.name} out of this shop? It acts at once.`)) return;
    const result = await removePerson(shopId, { id: member.id });
    setSaid(result.ok ? '' : (result.issues[0]?.message ?? result.message));
    router.refresh();
  };
  return (
    <li className="border-b border-rule py-3 last:border-b-0">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <div className="min-w-0">
          <p className="font-bold">
            {member.name}
            {self ? ' (you)' : ''}
          </p>
          <p className="break-words text-ink-2">
            {member.email}, {member.roles.map((role) => ROLES[role].toLowerCase()).join(', ')}
            {member.licenceNumber ? `, licence ${member.licenceNumber}` : ''}
          </p>
        </div>
        <div className="flex flex-wrap gap-3">
          <Button look="secondary" aria-expanded={editing} onClick={() => setEditing(!editing)}>
            Change<span className="sr-only"> {member.name}</span>
          </Button>
          {self ? null : (
            <Button look="danger" onClick={() => void remove()}>
              Take out<span className="sr-only"> {member.name}</span>
            </Button>
          )}
        </div>
      </div>
      {said ? (
        <p role="alert" className="font-bold text-danger">
          {said}
        </p>
      ) : null}
      {editing ? (
        <EditPerson
          key={member.version}
          shopId={shopId}
          member={member}
          onDone={() => {
            setEditing(false);
            router.refresh();
          }}
        />
      ) : null}
    </li>
  );
}

export function PeopleDesk({ shopId, members, self }: { shopId: string; members: Member[]; self: string }) {
  return (
    <div className="grid items-start gap-5 lg:grid-cols-[2fr_1fr]">
      <Sheet title="In this shop">
        <ul>
          {members.map((member) => (
            <MemberRow key={member.id} shopId={shopId} member={member} self={member.id === self} />
          ))}
        </ul>
      </Sheet>
      <AddPerson shopId={shopId} />
    </div>
  );
}
