/** The connection. Everything that speaks SQL lives under server/db; the rest asks repositories. */
import 'reflect-metadata'
import pg from 'pg'
import { DataSource, type EntityManager } from 'typeorm'
import { FarmerEntity } from './entities/farmer.ts'
import { MailEntity } from './entities/mail.ts'
import { DemonstrationEntity, RunEntity, TrialEntity } from './entities/plan.ts'
import { DoubtEntity, ReadingEntity } from './entities/reading.ts'
import { RecordEntity } from './entities/record.ts'
import { ImplementEntity, KitEntity, PlaceEntity, TractorEntity } from './entities/register.ts'
import { SheetEntity } from './entities/sheet.ts'
import { TrailEntity } from './entities/trail.ts'
import { PageEntity, UploadEntity } from './entities/upload.ts'
import { UserEntity, UserLinkEntity } from './entities/user.ts'
import { Book1764590000000 } from './migrations/0001-book.ts'
import { RateLimits1764590100000 } from './migrations/0002-rate-limits.ts'
import { Interface1764590200000 } from './migrations/0003-interface.ts'
import { Exclusions1764590300000 } from './migrations/0004-exclusions.ts'
import { Limits1764590400000 } from './migrations/0005-limits.ts'
import { Leaves1764590500000 } from './migrations/0006-leaves.ts'
import { SnakeNaming } from './naming.ts'

/** A transaction, or the pool itself: what every repository function takes first. */
export type Db = EntityManager
export type { DataSource }

const { builtins } = pg.types
/** Numbers as numbers; dates as the text they are, since a Date would move them to the process's time zone. */
pg.types.setTypeParser(builtins.INT8, Number)
pg.types.setTypeParser(builtins.NUMERIC, Number)
pg.types.setTypeParser(builtins.DATE, (text) => text)

export function createDataSource(url: string, options: { poolSize?: number } = {}): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities: [
      UserEntity,
      UserLinkEntity,
      FarmerEntity,
      PlaceEntity,
      TractorEntity,
      ImplementEntity,
      KitEntity,
      DemonstrationEntity,
      TrialEntity,
      RunEntity,
      SheetEntity,
      UploadEntity,
      PageEntity,
      ReadingEntity,
      DoubtEntity,
      RecordEntity,
      MailEntity,
      TrailEntity,
    ],
    migrations: [
      Book1764590000000,
      RateLimits1764590100000,
      Interface1764590200000,
      Exclusions1764590300000,
      Limits1764590400000,
      Leaves1764590500000,
    ],
    namingStrategy: new SnakeNaming(),
    synchronize: false,
    poolSize: options.poolSize ?? 10,
    extra: { idle_in_transaction_session_timeout: 30_000, connectionTimeoutMillis: 5_000 },
  })
}

export async function openDatabase(url: string, options: { poolSize?: number } = {}): Promise<DataSource> {
  return createDataSource(url, options).initialize()
}
