import { useMemo } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import type { Command } from '#src/components/commands/commandStore.ts';
import { useCommands } from '#src/components/commands/useCommands.ts';
import { usePerson } from '#src/hooks/useSession.ts';

const PLACES: readonly (readonly [string, string])[] = [
  ['Projects', '/projects'],
  ['Activity', '/activity'],
  ['Team', '/team'],
  ['Account', '/account'],
];

/** Ways to every place one can go from here, for the palette. */
export function useGoCommands(): void {
  const navigate = useNavigate();
  const { projectId } = useParams();
  const { createProject } = usePerson().abilities;
  const commands = useMemo(() => {
    const inProject = ['Frame', 'Modes', 'Release'].map(
      (place) => [place, `/projects/${projectId}/${place.toLowerCase()}`] as const,
    );
    const places = [
      ...(projectId === undefined ? [] : inProject),
      ...PLACES,
      ...(createProject ? [['New project', '/projects/new'] as const] : []),
    ];
    return places.map(([title, path]): Command => ({
      id: `go ${path}`,
      title,
      group: 'Go to',
      run: () => void navigate(path),
    }));
  }, [navigate, projectId, createProject]);
  useCommands(commands);
}
