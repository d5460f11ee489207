import { emailExamples } from '@/lib/emails/examples';

/** The text part is what everybody can read, so it is what stands here; the HTML part opens on a page of its own. */
export async function EmailsSection() {
  const mails = await Promise.all(
    Object.entries(emailExamples).map(async ([name, make]) => ({ name, mail: await make() })),
  );
  return (
    <ul className="grid items-start gap-6 lg:grid-cols-2">
      {mails.map(({ name, mail }) => (
        <li key={name} className="grid min-w-0 gap-2 border border-fallow bg-white p-4">
          <h3 className="text-base">{mail.subject}</h3>
          <p>
            <a className="text-link" href={`/gallery/mail/${name}`}>
              Open {name} as HTML
            </a>
          </p>
          <pre className="font-figures text-sm whitespace-pre-wrap wrap-anywhere">{mail.text}</pre>
        </li>
      ))}
    </ul>
  );
}
