import { useMemo, useState } from 'react';
import { toast } from '#src/lib/toast.ts';
import { ROLES } from '#shared/schemas/common.ts';
import type { TeamPerson } from '#shared/schemas/team.ts';
import { Button } from '#src/components/Button.tsx';
import { ConfirmDialog } from '#src/components/ConfirmDialog.tsx';
import { DataTable, type DataColumn } from '#src/components/dataTable/DataTable.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Select } from '#src/components/Select.tsx';
import { Switch } from '#src/components/Switch.tsx';
import { formatDateTime } from '#src/lib/formatTime.ts';
import { useUpdatePerson } from '../api/team.ts';

interface PeopleTableProps {
  people: readonly TeamPerson[];
  administer: boolean;
}

const ROLE_OPTIONS = ROLES.map((role) => ({ value: role, label: role }));

/** Who is in the team. Administrators change roles here; every change ends that person's sessions. */
export function PeopleTable({ people, administer }: PeopleTableProps) {
  const update = useUpdatePerson();
  const [leaving, setLeaving] = useState<TeamPerson | null>(null);
  const { mutate } = update;

  const columns = useMemo(() => {
    const list: DataColumn<TeamPerson>[] = [
      {
        id: 'name',
        header: 'Name',
        rowHeader: true,
        sortValue: (person) => person.name,
        cell: (person) => (
          <>
            <span className="font-medium">{person.name}</span>
            {!person.active && <span className="ml-2 text-ink-soft">deactivated</span>}
            {person.email !== '' && (
              <span className="block text-sm text-ink-soft">{person.email}</span>
            )}
          </>
        ),
      },
      {
        id: 'role',
        header: 'Role',
        className: 'min-w-36',
        sortValue: (person) => ROLES.indexOf(person.role),
        cell: (person) =>
          administer ? (
            <Select
              label={`Role of ${person.name}`}
              labelHidden
              value={person.role}
              options={ROLE_OPTIONS}
              disabled={!person.active}
              onValueChange={(role) =>
                mutate(
                  { personId: person.id, role },
                  { onSuccess: () => toast(`${person.name} is now ${role}`) },
                )
              }
            />
          ) : (
            person.role
          ),
      },
      {
        id: 'administrator',
        header: 'Administrator',
        cell: (person) =>
          administer ? (
            <Switch
              label={`${person.name} is an administrator`}
              labelHidden
              checked={person.isAdministrator}
              disabled={!person.active}
              onCheckedChange={(isAdministrator) =>
                mutate({ personId: person.id, isAdministrator })
              }
            />
          ) : person.isAdministrator ? (
            'yes'
          ) : (
            ''
          ),
      },
    ];
    if (!administer) return list;
    return [
      ...list,
      {
        id: 'seen',
        header: 'Last sign-in',
        sortValue: (person) => person.lastSignInAt,
        cell: (person) => (
          <span className="text-ink-soft">
            {person.lastSignInAt === null ? 'never' : formatDateTime(person.lastSignInAt)}
          </span>
        ),
      },
      {
        id: 'active',
        header: 'Access',
        cell: (person) =>
          person.active ? (
            <Button onClick={() => setLeaving(person)}>Deactivate</Button>
          ) : (
            <Button
              onClick={() =>
                mutate(
                  { personId: person.id, active: true },
                  { onSuccess: () => toast(`${person.name} may sign in again`) },
                )
              }
            >
              Reactivate
            </Button>
          ),
      },
    ] satisfies DataColumn<TeamPerson>[];
  }, [administer, mutate]);

  return (
    <section className="space-y-3">
      {update.isError && <ErrorNote error={update.error} />}
      <DataTable
        caption="People"
        rows={people}
        columns={columns}
        rowKey={(person) => person.id}
        initialSort={{ id: 'name', desc: false }}
      />
      {leaving && (
        <ConfirmDialog
          open
          onOpenChange={(open) => {
            if (!open) setLeaving(null);
          }}
          title={`Deactivate ${leaving.name}?`}
          action="Deactivate"
          busy={update.isPending}
          onConfirm={() =>
            mutate({ personId: leaving.id, active: false }, { onSettled: () => setLeaving(null) })
          }
        >
          Every session of theirs ends and they can’t sign in until somebody reactivates them. What
          they did stays as it is.
        </ConfirmDialog>
      )}
    </section>
  );
}
