/** Makes the bundles that are missing or older than their sources; returns their paths by name. */
export function ensureBundles(options?: {
  force?: boolean;
}): Promise<{ child: string; 'command-line': string }>;
