import type { Metadata } from 'next';
import { DefinitionList } from '@/lib/ui/show/definition-list';
import { GuidePage, Part, Points, Steps } from '../_components/guide-page';

export const metadata: Metadata = { title: 'Running it for more people' };

export default function GrowthPage() {
  return (
    <GuidePage
      href="/guide/growth"
      title="Running it for more people"
      lead="Loamline is two kinds of process around one PostgreSQL database, one object store and one mail service. Each can be replaced or multiplied by itself."
    >
      <Part title="The parts">
        <DefinitionList
          items={[
            {
              term: 'Web',
              said: 'Answers pages and the API',
              note: 'Keeps nothing between requests. Run as many as you like behind one address; sessions and limits live in the database.',
            },
            {
              term: 'Worker',
              said: 'Reads reports, sends mail, watches what is due',
              note: 'Run as many as you like. They share one queue in the database; two that sweep at once still send one letter, and a report whose worker died is read again.',
            },
            {
              term: 'PostgreSQL',
              said: 'DATABASE_URL and DATABASE_OWNER_URL',
              note: 'Any managed PostgreSQL of version 15 or later. Web and worker sign in as a role that can neither alter tables nor step around the wall between sites; the owner is needed for migrations only.',
            },
            {
              term: 'Object store',
              said: 'S3_ENDPOINT, S3_BUCKET, S3_REGION and a key',
              note: 'Any store that speaks the S3 protocol. Files go through the web process, so the bucket stays private.',
            },
            {
              term: 'Mail',
              said: 'RESEND_API_KEY and MAIL_FROM',
              note: 'Without them, mail goes to a mailbox page on the same machine, for trying things out.',
            },
          ]}
        />
      </Part>
      <Part title="In which order to grow">
        <Steps>
          <li>First move the database to a managed one, with backups that you have restored once.</li>
          <li>Then the files to an object store that keeps versions.</li>
          <li>
            Then a second worker: reading a PDF is the heaviest thing the program does, and it must not wait behind
            another grower’s.
          </li>
          <li>
            Then a second web process. Mind the number of database connections: each process opens at most as many as
            DATABASE_POOL says, and a worker a few more for the queue.
          </li>
        </Steps>
      </Part>
      <Part title="What is not done">
        <Points>
          <li>No read replicas: every query goes to the one database.</li>
          <li>No migration from one region to another, and no sharding of sites.</li>
          <li>Figures for your own machine come from the bench command of the project, not from this page.</li>
        </Points>
      </Part>
    </GuidePage>
  );
}
