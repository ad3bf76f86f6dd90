export function openMailbox(
  folder: string,
  options?: { port?: number },
): Promise<{ port: number; close(): Promise<void> }>;
