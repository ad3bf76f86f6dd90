/** On `globalThis`, because routes and the start of the server are bundled apart. */
const holder = globalThis as typeof globalThis & { surdworkMail?: { poke(): void } };

/** Puts the sender of this process in place; false when there is one already. */
export function takePlaceOfSender(sender: { poke(): void }): boolean {
  if (holder.surdworkMail !== undefined) return false;
  holder.surdworkMail = sender;
  return true;
}

/** Says that a letter was just queued. Does nothing in a process that sends none. */
export function pokeSending(): void {
  holder.surdworkMail?.poke();
}
