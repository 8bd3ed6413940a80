import type { Request, Response } from 'express';
import { AppError } from '#shared/errors/AppError.ts';
import { projectEvents, type ProjectEvent } from '#shared/schemas/project.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { authorize, can } from '#server/policies/policy.ts';
import { listen } from '#server/workers/notifications.ts';
import type { Services } from './services.ts';

/** Proxies cut silent connections; this is also how long a right that was taken away may linger. */
const HEARTBEAT_MS = 15_000;
/** Tabs of one person in one process. */
const MOST_STREAMS = 20;
/** A client this far behind is cut off: it reads everything again when it comes back. */
const MOST_UNSENT_BYTES = 256 * 1024;

const streamsByPerson = new Map<string, number>();

/** Server-sent events (HTML standard, section 9.2) of a project. */
export const eventRoutes = ({ log, closing }: Services): readonly Route[] => [
  handle(projectEvents, async ({ person, input, request, response }) => {
    const { projectId } = input.params;
    authorize(person, 'read-project', await Project.load(projectId));
    const giveBack = takeStream(person.id);

    const send = (event: ProjectEvent): void => {
      response.write(`data: ${JSON.stringify(event)}\n\n`);
      if (response.writableLength > MOST_UNSENT_BYTES) response.end();
    };
    const endUnlessAllowed = async (): Promise<void> => {
      try {
        if (!(await stillMayRead(person, projectId, request))) response.end();
      } catch (error) {
        log.warn({ err: error }, 'an event stream could not be checked');
        response.end();
      }
    };
    const stopListening = listen((message) => {
      if (message === 'missed') {
        send({ kind: 'project' });
      } else if (message.projectId === projectId) {
        send(message.event);
        if (message.event.kind === 'project') void endUnlessAllowed();
      }
    });
    const heartbeat = setInterval(() => {
      response.write(':\n\n');
      void endUnlessAllowed();
    }, HEARTBEAT_MS);
    const end = (): void => {
      response.end();
    };
    closing.addEventListener('abort', end);
    response.on('close', () => {
      clearInterval(heartbeat);
      stopListening();
      closing.removeEventListener('abort', end);
      giveBack();
    });
    open(response);
  }),
];

function open(response: Response): void {
  response.status(200).set({
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store, no-transform',
    'X-Accel-Buffering': 'no',
  });
  response.flushHeaders();
  response.write(':\n\n');
}

/** Counts a person's streams; gives what ends the count of this one. */
function takeStream(personId: string): () => void {
  const taken = streamsByPerson.get(personId) ?? 0;
  if (taken >= MOST_STREAMS) {
    throw new AppError(
      'too-many-requests',
      'Too many windows of yours follow projects: close some of them.',
      { retryAfterSeconds: 30 },
    );
  }
  streamsByPerson.set(personId, taken + 1);
  return () => {
    const left = (streamsByPerson.get(personId) ?? 1) - 1;
    if (left > 0) streamsByPerson.set(personId, left);
    else streamsByPerson.delete(personId);
  };
}

/** Whether the session, the person's role and the share are still what they were. */
async function stillMayRead(person: Person, projectId: string, request: Request): Promise<boolean> {
  const [now, project, sessionLives] = await Promise.all([
    Person.findByPk(person.id),
    Project.load(projectId),
    sessionIsAlive(request),
  ]);
  return (
    sessionLives &&
    now !== null &&
    now.active &&
    now.sessionEpoch === person.sessionEpoch &&
    project !== null &&
    can(now, 'read-project', project)
  );
}

const sessionIsAlive = (request: Request): Promise<boolean> =>
  new Promise((resolve) => {
    request.sessionStore.get(request.sessionID, (error: unknown, session) => {
      resolve(!error && session !== undefined && session !== null);
    });
  });
