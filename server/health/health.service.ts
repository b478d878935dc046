import type { DataSource } from 'typeorm';

/** Ready: connected, migrated, and not about to stop. Being alive needs none of that. */
export class HealthService {
  private stopping = false;
  private migrated = false;

  constructor(private readonly data: DataSource) {}

  stop(): void {
    this.stopping = true;
  }

  async ready(): Promise<boolean> {
    if (this.stopping || !this.data.isInitialized) return false;
    try {
      this.migrated ||= !(await this.data.showMigrations());
      await this.data.query('SELECT 1');
      return this.migrated;
    } catch {
      return false;
    }
  }
}
