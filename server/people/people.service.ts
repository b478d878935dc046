import type { DataSource } from 'typeorm';
import { breaksUnique } from '../problems/database-faults';
import { Conflict } from '../problems/domain-errors';
import type { Passwords } from './passwords';
import { Person } from './person.entity';

export interface NewPerson {
  name: string;
  email: string;
  password: string;
  administrator?: boolean;
}

export const normalEmail = (email: string) => email.trim().toLowerCase();

export class PeopleService {
  constructor(
    private readonly data: DataSource,
    private readonly passwords: Passwords,
  ) {}

  /** @throws Conflict when the e-mail address is taken */
  async create({ name, email, password, administrator = false }: NewPerson): Promise<Person> {
    const passwordHash = await this.passwords.hash(password);
    const people = this.data.getRepository(Person);
    try {
      return await people.save(
        people.create({ name: name.trim(), email: normalEmail(email), passwordHash, administrator }),
      );
    } catch (error) {
      if (breaksUnique(error, 'person_email_once'))
        throw new Conflict('Somebody with this e-mail address is here already.');
      throw error;
    }
  }

  byEmail(email: string): Promise<Person | null> {
    return this.data.getRepository(Person).findOneBy({ email: normalEmail(email) });
  }

  byId(id: string): Promise<Person | null> {
    return this.data.getRepository(Person).findOneBy({ id });
  }

  /** The person, when the two fit together; null says nothing about which half was wrong. */
  async byCredentials(email: string, password: string): Promise<Person | null> {
    const person = await this.data
      .getRepository(Person)
      .createQueryBuilder('person')
      .addSelect('person.passwordHash')
      .where('person.email = :email', { email: normalEmail(email) })
      .getOne();
    return (await this.passwords.fits(password, person?.passwordHash)) ? person : null;
  }
}
