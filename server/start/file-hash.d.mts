export function hashOfFiles(root: string, paths: readonly string[]): string
