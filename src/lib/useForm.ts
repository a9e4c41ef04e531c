import { type ChangeEvent, useState } from 'react';
import type { z } from 'zod';

/** First message for each field, by path joined with dots. */
export const fieldErrors = (issues: readonly { path: PropertyKey[]; message: string }[]) => {
  const errors: Record<string, string> = {};
  for (const issue of issues) {
    const path = issue.path.map(String).join('.');
    errors[path] ??= issue.message;
  }
  return errors;
};

/**
 * A form whose fields are checked by the same schema as on the server. What is typed is never thrown away: `check`
 * returns the parsed values, or null and fills `errors`.
 */
export const useForm = <Out, In extends object>(schema: z.ZodType<Out, In>, start: In) => {
  const [values, setValues] = useState(start);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const set = <K extends keyof In>(key: K, value: In[K]) => {
    setValues((old) => ({ ...old, [key]: value }));
    setErrors(({ [String(key)]: _gone, ...rest }) => rest);
  };
  /** Props of a Field for a key that holds text. */
  const text = <K extends keyof In>(key: K) => ({
    name: String(key),
    value: String(values[key] ?? ''),
    error: errors[String(key)] ?? null,
    onChange: (event: ChangeEvent<HTMLInputElement>) => set(key, event.target.value as In[K]),
  });
  const check = (): Out | null => {
    const read = schema.safeParse(values);
    setErrors(read.success ? {} : fieldErrors(read.error.issues));
    return read.success ? read.data : null;
  };
  return { values, set, text, check, errors };
};
