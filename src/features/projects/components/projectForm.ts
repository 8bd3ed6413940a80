import { z } from 'zod';
import { createProject } from '#shared/schemas/project.ts';

/** Name and machine, as the contract of a new project has them. */
export const projectForm = z.object({
  name: createProject.body.shape.name,
  machine: createProject.body.shape.machine,
});
export type ProjectFormInput = z.input<typeof projectForm>;
