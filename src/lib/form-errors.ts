import type { FieldPath, FieldValues, UseFormSetError } from 'react-hook-form';
import { z } from 'zod';
import { ApiError } from './api-error.ts';

/** Errors at the field, in words that suggest the fix; the rules themselves stand in shared/schemas. */
z.config({
  customError: (issue) => {
    if (issue.code === 'invalid_type')
      return issue.expected === 'number' || issue.expected === 'int'
        ? 'Write a number'
        : 'This is needed';
    if (issue.code === 'too_small')
      return issue.origin === 'number'
        ? `At least ${String(issue.minimum)}`
        : issue.minimum === 1
          ? 'This is needed'
          : `At least ${String(issue.minimum)} characters`;
    if (issue.code === 'too_big')
      return issue.origin === 'number'
        ? `At most ${String(issue.maximum)}`
        : `At most ${String(issue.maximum)} characters`;
    if (issue.code === 'invalid_format' && issue.format === 'uuid') return 'Choose one';
    return undefined;
  },
});

/** What the server found, put at the fields it names; answers whether every fault found its field. */
export function showFieldErrors<T extends FieldValues>(
  error: unknown,
  setError: UseFormSetError<T>,
): boolean {
  if (!(error instanceof ApiError) || error.fieldErrors.length === 0) return false;
  for (const { pointer, detail } of error.fieldErrors) {
    // Pointers of the body name the members of the form.
    const path = pointer.replace(/^\//, '').replaceAll('/', '.') as FieldPath<T>;
    setError(path, { message: detail });
  }
  return true;
}

/** Text of a number field to a number; empty is null, so that an optional one may be left out. */
export const asNumber = (text: unknown): number | null => {
  if (typeof text === 'number') return text;
  if (typeof text !== 'string' || text.trim() === '') return null;
  return Number(text.replace(',', '.'));
};
