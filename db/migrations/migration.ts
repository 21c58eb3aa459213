/** One step of the schema: statements run in order by the schema's owner, once. */
export interface Migration {
  readonly name: string;
  readonly statements: readonly string[];
}
