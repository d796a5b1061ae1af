import { useState, type SyntheticEvent } from 'react';
import { Role } from '../../../../shared/schemas/session.ts';
import { CreateUser, PatchUser, type User } from '../../../../shared/schemas/user.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { CheckField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { roleWords } from '../../../hooks/use-session.ts';
import { useSaveUser } from '../../../queries/people-queries.ts';

interface Props {
  subject: User | 'new' | null;
  onClose: () => void;
}

const WHAT: Record<Role, string> = {
  operator: 'Loads element sets, runs the shift, repairs the running day',
  scheduler: 'Builds, submits, releases and revises plans',
  lead: 'States what own missions need, signs off; becomes lead of a mission on the mission’s page',
  administrator: 'Keeps people, missions, stations and their arrays',
};

/** A new account, or changes of one: name, roles, a new first password, access. */
export function PersonDialog({ subject, onClose }: Props) {
  const user = subject === 'new' ? null : subject;
  return (
    <Dialog
      open={subject !== null}
      onClose={onClose}
      title={user ? user.name : 'Give somebody an account'}
      description={
        user
          ? user.email
          : 'Tell the first password by another way than mail; it can be changed here.'
      }
    >
      {subject !== null && <PersonForm user={user} onClose={onClose} />}
    </Dialog>
  );
}

type Errors = Record<string, string>;

function PersonForm({ user, onClose }: { user: User | null; onClose: () => void }) {
  const save = useSaveUser();
  const announce = useAnnounce();
  const [name, setName] = useState(user?.name ?? '');
  const [email, setEmail] = useState(user?.email ?? '');
  const [roles, setRoles] = useState<Role[]>(user?.roles ?? []);
  const [password, setPassword] = useState('');
  const [disabled, setDisabled] = useState(user?.disabled ?? false);
  const [errors, setErrors] = useState<Errors>({});

  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    const checked = user
      ? PatchUser.safeParse({ name, roles, disabled, ...(password && { password }) })
      : CreateUser.safeParse({ name, email, roles, password });
    if (!checked.success) {
      setErrors(
        Object.fromEntries(
          checked.error.issues.map((one) => [String(one.path[0] ?? ''), one.message]),
        ),
      );
      return;
    }
    setErrors({});
    const change = user
      ? { user, body: PatchUser.parse(checked.data) }
      : { user: null, body: CreateUser.parse(checked.data) };
    save.mutate(change, {
      onSuccess: (saved) => {
        announce(`${saved.name} is saved.`);
        onClose();
      },
    });
  };
  const toggle = (role: Role, on: boolean): void =>
    setRoles((before) => (on ? [...before, role] : before.filter((one) => one !== role)));

  return (
    <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
      <TextField
        label="Name"
        autoComplete="off"
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={errors.name}
      />
      {!user && (
        <TextField
          label="E-mail"
          type="email"
          autoComplete="off"
          value={email}
          onChange={(event) => setEmail(event.target.value)}
          error={errors.email}
        />
      )}
      <fieldset className="flex flex-col gap-2">
        <legend className="mb-1.5 text-table font-semibold">Roles</legend>
        {Role.options.map((role) => (
          <CheckField
            key={role}
            label={roleWords([role])}
            hint={WHAT[role]}
            checked={roles.includes(role)}
            onChange={(event) => toggle(role, event.target.checked)}
          />
        ))}
        {errors.roles && (
          <p role="alert" className="text-caption font-medium text-danger-text">
            {errors.roles}
          </p>
        )}
      </fieldset>
      <TextField
        label={user ? 'New password' : 'First password'}
        type="password"
        autoComplete="new-password"
        hint={
          user ? 'Empty: the password stays. A new one ends all sessions.' : '12 characters or more'
        }
        value={password}
        onChange={(event) => setPassword(event.target.value)}
        error={errors.password}
      />
      {user && (
        <CheckField
          label="Disabled"
          hint="All sessions end at once; what the person did stays on the audit trail"
          checked={disabled}
          onChange={(event) => setDisabled(event.target.checked)}
        />
      )}
      <ErrorNote error={save.error} />
      <div className="flex justify-end gap-2">
        <Button onClick={onClose}>Keep as it is</Button>
        <Button type="submit" variant="primary" busy={save.isPending}>
          {user ? 'Save the changes' : 'Give the account'}
        </Button>
      </div>
    </form>
  );
}
