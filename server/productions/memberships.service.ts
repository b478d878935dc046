import type { DataSource } from 'typeorm';
import type { Role } from '../../shared/words';
import type { Actor } from '../people/actor';
import { NotAllowed, NotFound } from '../problems/domain-errors';
import { type Page, type PageOrder, type PageRequest, pageOf } from '../paging/cursor';
import { Membership } from './membership.entity';
import { Production } from './production.entity';

const RANK: Record<Role, number> = { artist: 1, 'technical-director': 2, lead: 3 };

const REFUSAL: Record<Role, string> = {
  artist: 'You are not a member of this production.',
  'technical-director': 'Technical directors and leads of this production may do that. Ask one of them.',
  lead: 'Leads of this production may do that. Ask one of them.',
};

const BY_NAME: PageOrder<Membership> = {
  column: 'person.name',
  type: 'text',
  tie: 'person.id',
  tieType: 'uuid',
  direction: 'ASC',
  keyOf: ({ person }) => [person.name, person.id],
};

/** Who may do what in which production. Every other service asks here. */
export class MembershipsService {
  constructor(private readonly data: DataSource) {}

  /**
   * Passes for an administrator and for a member whose role includes `least`.
   * @throws NotFound for somebody outside, naming `what` they asked for; NotAllowed for a lesser role
   */
  async require(actor: Actor, productionId: string, least: Role, what = 'production'): Promise<void> {
    if (actor.administrator) {
      if (await this.data.getRepository(Production).existsBy({ id: productionId })) return;
      throw new NotFound(what);
    }
    const membership = await this.data.getRepository(Membership).findOneBy({ productionId, personId: actor.id });
    if (!membership) throw new NotFound(what);
    if (RANK[membership.role] < RANK[least]) throw new NotAllowed(REFUSAL[least]);
  }

  ofPerson(personId: string): Promise<Membership[]> {
    return this.data.getRepository(Membership).find({
      where: { personId },
      relations: { production: true },
      order: { production: { name: 'ASC' } },
    });
  }

  inProduction(productionId: string, request: PageRequest): Promise<Page<Membership>> {
    const query = this.data
      .getRepository(Membership)
      .createQueryBuilder('membership')
      .innerJoinAndSelect('membership.person', 'person')
      .where('membership.productionId = :productionId', { productionId });
    return pageOf(query, BY_NAME, request);
  }

  /** Gives the role, or changes it for somebody who is in already. */
  async set(productionId: string, personId: string, role: Role): Promise<void> {
    await this.data.getRepository(Membership).upsert({ productionId, personId, role }, ['productionId', 'personId']);
  }
}
