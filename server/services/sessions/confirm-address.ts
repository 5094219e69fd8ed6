import { and, eq, isNull, sql } from 'drizzle-orm'
import { companies, orders, people, personRoles } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { DomainError } from '../errors'

type AskingOrder = Pick<typeof orders.$inferSelect, 'id' | 'number' | 'contactName' | 'firmName' | 'countryCode' | 'vatNumber'>

/**
 * Marks an address as confirmed: finds or makes the person and their company, and puts every order that was asked for under the
 * address, and belongs to nobody yet, under them.
 * @throws DomainError gone when the order of the link no longer stands under the address
 */
export async function confirmAddress(tx: Transaction, { email, orderId }: { email: string, orderId: string | null }): Promise<{ personId: string, orderNumber: number }> {
  const [order] = await tx.select({
    id: orders.id, number: orders.number, contactName: orders.contactName, firmName: orders.firmName, countryCode: orders.countryCode, vatNumber: orders.vatNumber,
  }).from(orders).where(and(eq(orders.id, orderId ?? sql`null`), eq(orders.contactEmail, email))).for('update')
  if (!order) throw new DomainError('gone', 'The order of this link is no longer there.')

  const person = await findOrCreatePerson(tx, email, order)
  const companyId = person.companyId ?? await createCompany(tx, person.id, order)
  await tx.update(orders).set({ personId: person.id, companyId }).where(and(eq(orders.contactEmail, email), isNull(orders.personId), isNull(orders.companyId)))
  return { personId: person.id, orderNumber: order.number }
}

async function findOrCreatePerson(tx: Transaction, email: string, order: AskingOrder): Promise<{ id: string, companyId: string | null }> {
  await tx.insert(people).values({ email, name: order.contactName }).onConflictDoNothing()
  const [person] = await tx.update(people).set({ emailConfirmedAt: sql`coalesce(${people.emailConfirmedAt}, now())` })
    .where(eq(people.email, email)).returning({ id: people.id, companyId: people.companyId })
  if (!person) throw new Error('the person that was just written is not there')
  await tx.insert(personRoles).values({ personId: person.id, role: 'customer' }).onConflictDoNothing()
  return person
}

async function createCompany(tx: Transaction, personId: string, order: AskingOrder): Promise<string> {
  const [company] = await tx.insert(companies).values({ name: order.firmName, countryCode: order.countryCode, vatNumber: order.vatNumber }).returning({ id: companies.id })
  await tx.update(people).set({ companyId: company!.id }).where(eq(people.id, personId))
  return company!.id
}
