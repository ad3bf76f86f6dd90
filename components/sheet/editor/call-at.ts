import { codeLength } from './word-at';

export interface CallAt {
  name: string;
  /** Where the name begins. */
  from: number;
  /** The argument in which the cursor stands, from 0. */
  argument: number;
}

const NAME_BEFORE = /([\p{L}][\p{L}\p{N}_]*)\s*$/u;

/**
 * The innermost call around a cursor whose name `isKnown`, told by counting brackets backwards, so that a line in the
 * middle of being written has one too. Brackets that only group are passed over. Cost: linear in the line.
 */
export function callAt(
  line: string,
  cursor: number,
  isKnown: (name: string) => boolean,
): CallAt | null {
  if (cursor > codeLength(line)) return null;
  let closed = 0;
  let argument = 0;
  for (let at = cursor - 1; at >= 0; at -= 1) {
    const sign = line.charAt(at);
    if (')]}'.includes(sign)) closed += 1;
    else if (sign === ',' && closed === 0) argument += 1;
    else if ('([{'.includes(sign)) {
      if (closed > 0) closed -= 1;
      else {
        const name = sign === '(' ? NAME_BEFORE.exec(line.slice(0, at))?.[1] : undefined;
        if (name !== undefined && isKnown(name)) {
          return { name, from: line.lastIndexOf(name, at), argument };
        }
        argument = 0;
      }
    }
  }
  return null;
}

/** The parameters of a signature such as `chord(R, angle)`; brackets inside one are kept together. */
export function parametersOf(signature: string): string[] {
  const inside = signature.slice(signature.indexOf('(') + 1, signature.lastIndexOf(')'));
  const found: string[] = [];
  let depth = 0;
  let from = 0;
  for (let at = 0; at <= inside.length; at += 1) {
    const sign = inside.charAt(at);
    if ('([{'.includes(sign) && sign !== '') depth += 1;
    else if (')]}'.includes(sign) && sign !== '') depth -= 1;
    else if ((sign === ',' && depth === 0) || sign === '') {
      found.push(inside.slice(from, at).trim());
      from = at + 1;
    }
  }
  return found.filter((name) => name !== '');
}

/** Which parameter an argument is for: beyond the last, the last, where it stands for any number. */
export function parameterOf(parameters: readonly string[], argument: number): number | null {
  if (argument < parameters.length && parameters[argument] !== '…') return argument;
  const rest = parameters.indexOf('…');
  return rest >= 0 && argument >= rest ? rest : null;
}
