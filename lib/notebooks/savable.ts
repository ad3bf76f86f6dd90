import { SettingsRequest } from '@/lib/evaluation';
import { NotebookContent } from './content';

/**
 * Content as it may be stored: what `NotebookContent` asks, and cutting steps that the language can
 * read, since a notebook with any other could not be evaluated at all.
 */
export const SavableContent = NotebookContent.superRefine(({ settings, cells }, context) => {
  const check = (step: string | null | undefined, path: (string | number)[]) => {
    const read = SettingsRequest.safeParse({ step });
    for (const { message } of read.error?.issues ?? []) {
      context.addIssue({ code: 'custom', path, message });
    }
  };
  check(settings.step, ['settings', 'step']);
  cells.forEach((cell, index) => check(cell.settings?.step, ['cells', index, 'settings', 'step']));
});
