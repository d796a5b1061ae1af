import type { User } from '../../../../shared/schemas/user.ts';
import { Button } from '../../../components/button.tsx';
import { Chip } from '../../../components/chip.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { roleWords } from '../../../hooks/use-session.ts';
import { useSorted } from '../../../hooks/use-sorted.ts';

const ORDERS = {
  name: (user: User) => user.name,
  email: (user: User) => user.email,
  roles: (user: User) => roleWords(user.roles),
};

interface Props {
  people: readonly User[];
  onEdit: (user: User) => void;
}

export function PeopleTable({ people, onEdit }: Props) {
  const { rows, sortOf } = useSorted(people, ORDERS, { by: 'name' });
  return (
    <Table caption="People" fill>
      <thead>
        <tr>
          <Head {...sortOf('name')}>Name</Head>
          <Head {...sortOf('email')}>E-mail</Head>
          <Head {...sortOf('roles')}>Roles</Head>
          <Head>Access</Head>
          <Head>
            <span className="sr-only">Change</span>
          </Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((user) => (
          <tr key={user.id} className="hover:bg-raised">
            <RowHead>{user.name}</RowHead>
            <Cell>{user.email}</Cell>
            <Cell>{roleWords(user.roles)}</Cell>
            <Cell>
              {user.disabled ? (
                <Chip tone="neutral" icon="struck">
                  Disabled
                </Chip>
              ) : (
                <Chip tone="ok" icon="approve">
                  Open
                </Chip>
              )}
            </Cell>
            <Cell className="text-right">
              <Button size="small" icon="pencil" onClick={() => onEdit(user)}>
                Change <span className="sr-only">{user.name}</span>
              </Button>
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
