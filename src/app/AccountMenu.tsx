import { useMutation, useQueryClient } from '@tanstack/react-query';
import { ChevronDown } from 'lucide-react';
import { Link, useNavigate } from 'react-router-dom';
import { toast } from '#src/lib/toast.ts';
import { signOut } from '#shared/schemas/session.ts';
import { Button } from '#src/components/Button.tsx';
import { Menu, MenuHeading, MenuItem, MenuRule } from '#src/components/Menu.tsx';
import { usePerson } from '#src/hooks/useSession.ts';
import { call } from '#src/lib/api.ts';
import { messageOf } from '#src/lib/messageOf.ts';

/** The person's own menu. On small screens it also takes what does not fit in the strip. */
export function AccountMenu() {
  const person = usePerson();
  const client = useQueryClient();
  const navigate = useNavigate();
  const leave = useMutation({
    mutationFn: () => call(signOut, {}),
    onSuccess: async () => {
      await navigate('/sign-in');
      client.clear();
    },
    onError: (error) => toast(messageOf(error)),
  });
  return (
    <Menu
      trigger={
        <Button look="quiet" className="max-w-40 sm:max-w-56">
          <span className="truncate">{person.name}</span>
          <ChevronDown aria-hidden="true" className="size-4 shrink-0" />
        </Button>
      }
    >
      <MenuHeading>
        {person.team.name} · {person.role}
        {person.isAdministrator && ', administrator'}
      </MenuHeading>
      <div className="sm:hidden">
        <MenuItem asChild>
          <Link to="/activity">Activity</Link>
        </MenuItem>
        <MenuItem asChild>
          <Link to="/team">Team</Link>
        </MenuItem>
      </div>
      <MenuItem asChild>
        <Link to="/account">Account</Link>
      </MenuItem>
      <MenuRule />
      <MenuItem onSelect={() => leave.mutate()}>Sign out</MenuItem>
    </Menu>
  );
}
