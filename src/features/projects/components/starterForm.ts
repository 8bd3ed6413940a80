import { z } from 'zod';
import { feet } from '#shared/frame/starters/parameters.ts';
import type { Starter } from '#shared/frame/starters/starters.ts';
import { projectForm } from './projectForm.ts';

/** The feet are what a first frequency hangs on most: nobody chooses them but the designer. */
const chosenFeet = feet.nullable().transform((value, context) => {
  if (value !== null) return value;
  context.addIssue({ code: 'custom', message: 'Choose what the frame stands on.' });
  return z.NEVER;
});

/** What the form of a starter asks for: the project's own name, and the starter's parameters. */
export const starterForm = (starter: Starter) =>
  z.object({
    machineName: projectForm.shape.machine,
    ...starter.parameters.shape,
    name: projectForm.shape.name,
    feet: chosenFeet,
  });
export type StarterFormInput = z.input<ReturnType<typeof starterForm>>;
export type StarterFormOutput = z.output<ReturnType<typeof starterForm>>;

/** The starter's defaults, with no feet chosen yet. */
export function starterDefaults(starter: Starter): StarterFormInput {
  const parameters = starter.parameters.parse({ name: starter.name });
  return { ...parameters, name: '', machineName: '', feet: null };
}

/** Figures to begin with once feet with a stiffness are chosen; the form asks to replace them. */
export const FEET_TO_BEGIN_WITH = {
  kind: 'stiffness',
  vertical: 20e6,
  horizontal: 10e6,
  tilting: 0,
} as const;
