import type { DeepPartial, FindManyOptions, FindOptionsWhere, ObjectLiteral, Repository } from 'typeorm'

/** A TypeORM repository that cannot forget the group: the first of the two layers that separate groups. */
export class GroupRepository<Row extends ObjectLiteral> {
  constructor(
    private readonly inner: Repository<Row>,
    private readonly groupId: string,
  ) {}

  private scoped(where: FindOptionsWhere<Row>): FindOptionsWhere<Row> {
    return { ...where, groupId: this.groupId } as FindOptionsWhere<Row>
  }

  findOneBy(where: FindOptionsWhere<Row>): Promise<Row | null> {
    return this.inner.findOneBy(this.scoped(where))
  }

  findBy(where: FindOptionsWhere<Row>, options: Omit<FindManyOptions<Row>, 'where'> = {}): Promise<Row[]> {
    return this.inner.find({ ...options, where: this.scoped(where) })
  }

  /** The row, locked until the end of the transaction. */
  findOneForUpdate(where: FindOptionsWhere<Row>): Promise<Row | null> {
    return this.inner.findOne({ where: this.scoped(where), lock: { mode: 'pessimistic_write' } })
  }

  countBy(where: FindOptionsWhere<Row>): Promise<number> {
    return this.inner.countBy(this.scoped(where))
  }

  /** Inserts one new row and returns it. */
  async insert(row: DeepPartial<Row>): Promise<Row> {
    const entity = this.inner.create({ ...row, groupId: this.groupId } as DeepPartial<Row>)
    await this.inner.insert(entity)
    return entity
  }

  /** Changes the columns given of the rows that match. Returns how many rows changed. */
  async update(where: FindOptionsWhere<Row>, changes: Partial<Row>): Promise<number> {
    const result = await this.inner.update(this.scoped(where), changes as never)
    return result.affected ?? 0
  }

  /** A query builder that already holds the group's condition. */
  query(alias: string) {
    return this.inner
      .createQueryBuilder(alias)
      .where(`${alias}.groupId = :groupId`, { groupId: this.groupId })
  }
}
