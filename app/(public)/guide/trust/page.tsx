import type { Metadata } from 'next';
import { GuidePage, Part, Points } from '../_components/guide-page';

export const metadata: Metadata = { title: 'What you can rely on, and what is missing' };

export default function TrustPage() {
  return (
    <GuidePage
      href="/guide/trust"
      title="What you can rely on, and what is missing"
      lead="What is true of this program today, and the gaps we know of. Nothing here is a plan written as a fact."
    >
      <Part title="Your data stays on your site">
        <Points>
          <li>
            Every row belongs to one site. The program asks for your role on each request, and the database refuses rows
            of any other site a second time by itself.
          </li>
          <li>Somebody who is not on a site is told the same as if it did not exist.</li>
          <li>
            Owners, advisers, helpers and viewers may do different things. Viewers do not see the original report files:
            those carry names and addresses.
          </li>
          <li>What is confirmed never changes silently. A correction is a new value, with who, when and why.</li>
        </Points>
      </Part>
      <Part title="Signing in">
        <Points>
          <li>Passwords are kept as argon2id hashes only. The best-known and easily guessed ones are refused.</li>
          <li>
            A session ends after seven days without a visit. You can sign out everywhere, and a new password can end all
            other sessions.
          </li>
          <li>
            Too many wrong passwords close the door of an account for a while; a new password by mail opens it at once.
          </li>
        </Points>
      </Part>
      <Part title="Files and mail">
        <Points>
          <li>
            A file is judged by its content, not its name, and kept even when it cannot be read. Each is opened in a
            process of its own that has no access to anything else, and that is stopped when it takes too long or too
            much memory.
          </li>
          <li>A reading is a proposal. Nothing becomes a result before a person has confirmed it beside the page.</li>
          <li>
            Every mail is written down before it is sent and leaves once, also when a process dies in between. If the
            mail service gives no clear answer for a day, we stop trying rather than send it twice.
          </li>
          <li>Reminder mail ends with one press, without signing in.</li>
        </Points>
      </Part>
      <Part title="Gaps" id="gaps">
        <p>Not built, or not proven. If one of these matters to you, wait with what is sensitive.</p>
        <Points>
          <li>
            <strong>No virus scan.</strong> Signatures need a service that is not part of this program. The place where
            a scanner would stand exists.
          </li>
          <li>
            <strong>No look-up of leaked passwords.</strong> Only a list of common ones that ships with the program is
            asked.
          </li>
          <li>
            <strong>No second factor</strong> at sign-in yet.
          </li>
          <li>
            <strong>No rehearsed restore.</strong> There is a database role for backups; a drill that restores one and
            checks it is not written yet. Until then, whoever runs this program has to back up the database and the file
            store themselves.
          </li>
          <li>
            <strong>No deletion or whole-site export by yourself</strong> yet. Results can be taken out as CSV.
          </li>
          <li>
            <strong>No outside audit.</strong> The checks are our own.
          </li>
        </Points>
      </Part>
    </GuidePage>
  );
}
