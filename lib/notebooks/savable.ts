import { SettingsRequest } from '@/lib/evaluation';
import { NotebookContent } from './content';

/**
 * Content as it may be stored: what `NotebookContent` asks, and a cutting step that the language can
 * read, since a notebook with any other could not be evaluated at all.
 */
export const SavableContent = NotebookContent.superRefine(({ settings }, context) => {
  const read = SettingsRequest.safeParse({ step: settings.step });
  for (const { message } of read.error?.issues ?? []) {
    context.addIssue({ code: 'custom', path: ['settings', 'step'], message });
  }
});
