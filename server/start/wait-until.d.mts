export function waitUntil<Answer>(
  condition: () => Answer | Promise<Answer>,
  options?: { readonly limit?: number; readonly interval?: number },
): Promise<Answer | null>
