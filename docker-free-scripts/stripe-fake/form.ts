/** Form bodies with nested brackets, as the SDK sends them: `line_items[0][price_data][currency]=usd`. */
import { badParam } from './errors';

export type FormValue = string | FormObject;
export interface FormObject {
  [key: string]: FormValue;
}

const MAX_DEPTH = 8;

const empty = (): FormObject => Object.create(null) as FormObject;

/** `a[b][]` -> a, b, '' */
function pathOf(name: string): string[] {
  const open = name.indexOf('[');
  if (open < 0) return [name];
  const rest = name.slice(open);
  if (!/^(\[[^\][]*\])+$/.test(rest)) throw badParam(name, `Invalid parameter name: ${name}`);
  return [name.slice(0, open), ...rest.slice(1, -1).split('][')];
}

function put(target: FormObject, path: string[], value: string, name: string): void {
  if (path.length > MAX_DEPTH) throw badParam(name, `Parameter is nested too deeply: ${name}`);
  let at = target;
  path.forEach((part, index) => {
    const key = part === '' ? String(Object.keys(at).length) : part;
    if (index === path.length - 1) {
      at[key] = value;
      return;
    }
    const next = (at[key] ??= empty());
    if (typeof next === 'string') throw badParam(name, `Parameter is given twice in two shapes: ${name}`);
    at = next;
  });
}

/** @throws {ApiError} naming a parameter whose name can't be read */
export function parseForm(text: string): FormObject {
  const form = empty();
  for (const [name, value] of new URLSearchParams(text)) put(form, pathOf(name), value, name);
  return form;
}
