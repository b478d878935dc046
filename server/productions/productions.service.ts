import type { DataSource, EntityManager } from 'typeorm';
import type { Role } from '../../shared/words';
import { Membership } from './membership.entity';
import type { MembershipsService } from './memberships.service';
import { type Page, type PageOrder, type PageRequest, pageOf } from '../paging/cursor';
import type { Actor } from '../people/actor';
import { breaksUnique } from '../problems/database-faults';
import { Conflict } from '../problems/domain-errors';
import { Production } from './production.entity';

const BY_NAME: PageOrder<Production> = {
  column: 'production.name',
  type: 'text',
  tie: 'production.id',
  tieType: 'uuid',
  direction: 'ASC',
  keyOf: ({ name, id }) => [name, id],
};

export class ProductionsService {
  constructor(
    private readonly data: DataSource,
    private readonly memberships: MembershipsService,
  ) {}

  /** @throws Conflict when a production of this name exists */
  async create(name: string): Promise<Production> {
    const productions = this.data.getRepository(Production);
    try {
      return await productions.save(productions.create({ name: name.trim() }));
    } catch (error) {
      if (breaksUnique(error, 'production_name_once'))
        throw new Conflict('There is a production of this name already.');
      throw error;
    }
  }

  byName(name: string): Promise<Production | null> {
    return this.data.getRepository(Production).findOneBy({ name: name.trim() });
  }

  addMember(productionId: string, personId: string, role: Role): Promise<void> {
    return this.memberships.set(productionId, personId, role);
  }

  /** Those the person is in, with the role there; every one for an administrator. */
  async list(actor: Actor, request: PageRequest): Promise<Page<{ production: Production; role: Role | null }>> {
    const query = this.data.getRepository(Production).createQueryBuilder('production');
    if (!actor.administrator) {
      query.innerJoin(Membership, 'mine', 'mine.productionId = production.id AND mine.personId = :me', {
        me: actor.id,
      });
    }
    const page = await pageOf(query, BY_NAME, request);
    const mine = await this.memberships.ofPerson(actor.id);
    const roles = new Map(mine.map(({ productionId, role }) => [productionId, role]));
    return {
      items: page.items.map((production) => ({ production, role: roles.get(production.id) ?? null })),
      nextCursor: page.nextCursor,
    };
  }

  async members(actor: Actor, productionId: string, request: PageRequest): Promise<Page<Membership>> {
    await this.memberships.require(actor, productionId, 'artist');
    return this.memberships.inProduction(productionId, request);
  }

  /** Takes the next run number. The row stays locked until the transaction ends, so no two runs share one. */
  async nextRunNumber(manager: EntityManager, productionId: string): Promise<number> {
    await manager.increment(Production, { id: productionId }, 'lastRunNumber', 1);
    const { lastRunNumber } = await manager.findOneByOrFail(Production, { id: productionId });
    return lastRunNumber;
  }
}
