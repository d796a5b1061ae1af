import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { User } from '../../../shared/schemas/user.ts';
import { Button } from '../../components/button.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { PeopleTable } from '../../features/users/components/people-table.tsx';
import { PersonDialog } from '../../features/users/components/person-dialog.tsx';
import { useTitle } from '../../hooks/use-title.ts';
import { counted } from '../../lib/format-number.ts';
import { peopleQueries } from '../../queries/people-queries.ts';

export function Component() {
  useTitle('People');
  const people = useQuery(peopleQueries.list());
  const [open, setOpen] = useState<User | 'new' | null>(null);
  return (
    <>
      <PageHead
        title="People"
        aside={people.data && counted(people.data.length, 'account')}
        actions={
          people.data && (
            <Button variant="primary" icon="add" onClick={() => setOpen('new')}>
              Give somebody an account
            </Button>
          )
        }
      />
      <PageBody>
        <Panel title="Accounts" aside="Roles decide what a person sees and may do" flush>
          <QueryView query={people} what="The list of people" who="Administrators">
            {(list) => <PeopleTable people={list} onEdit={setOpen} />}
          </QueryView>
        </Panel>
      </PageBody>
      <PersonDialog
        key={open === 'new' ? 'new' : (open?.id ?? 'none')}
        subject={open}
        onClose={() => setOpen(null)}
      />
    </>
  );
}
