export const DEMO_PEOPLE: readonly {
  name: string;
  email: string;
  password: string;
  administrator: boolean;
  role: 'lead' | 'technical-director' | 'artist' | null;
}[];
export function demoLines(): string;
