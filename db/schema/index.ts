export * from '@/db/schema/sampleDesigns'
export * from '@/db/schema/spreadRuns'
