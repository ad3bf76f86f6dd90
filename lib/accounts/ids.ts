const SHAPE = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;

/** Whether a text can be the id of anything we store; everything else is simply not found. */
export function isId(text: string): boolean {
  return SHAPE.test(text);
}
