export const repository: string
