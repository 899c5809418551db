/** One line a fault; messages of the queue carry ids only, so nothing personal is written. */
export function logFault(requestId: string, where: string, error: unknown): void {
  const text = error instanceof Error ? error.message : String(error);
  console.error(JSON.stringify({ at: new Date().toISOString(), requestId, where, fault: text.slice(0, 500) }));
}
