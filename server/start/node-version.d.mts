export function nodeVersionProblem(version: string): string | null
