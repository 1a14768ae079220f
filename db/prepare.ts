/** Brings the database that DATABASE_URL names to the newest schema and writes the worked samples. */
import { connectDatabase } from '@/db/client'
import { migrateDatabase } from '@/db/migrate'
import { seedSamples } from '@/db/seed/seedSamples'

const url = process.env.DATABASE_URL
if (!url) {
  console.error('DATABASE_URL is not set.')
  process.exit(1)
}

const { db, close } = connectDatabase({ url, poolSize: 1, onIdleError: (error) => console.error(error.message) })
try {
  await migrateDatabase(db)
  await seedSamples(db)
} finally {
  await close()
}
