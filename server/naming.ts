import { DefaultNamingStrategy, type NamingStrategyInterface } from 'typeorm';

const snake = (name: string) => name.replace(/([a-z0-9])([A-Z])/g, '$1_$2').toLowerCase();

/** Columns in PostgreSQL's own case: createdAt is created_at, so that nobody has to quote names. */
export class SnakeNaming extends DefaultNamingStrategy implements NamingStrategyInterface {
  override columnName(property: string, custom: string | undefined, prefixes: string[]): string {
    return snake([...prefixes, custom ?? property].join('_'));
  }

  override joinColumnName(relation: string, referenced: string): string {
    return snake(`${relation}_${referenced}`);
  }
}
