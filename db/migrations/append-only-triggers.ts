/** Triggers that stop whoever holds more rights than the application from changing or deleting rows of a table. */
export function appendOnly(table: string): string[] {
  return (['UPDATE', 'DELETE'] as const).map(
    (move) => `CREATE TRIGGER ${table}_no_${move.toLowerCase()} BEFORE ${move} ON ${table} FOR EACH ROW
      SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${table} is append-only'`,
  );
}
