export * from '@/db/schema/sampleDesigns'
