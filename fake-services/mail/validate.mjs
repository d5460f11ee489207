const MOST_RECIPIENTS = 50;
const ADDRESS = /^(?:[^<>\r\n]*<)?[^\s@<>,;"]+@[^\s@<>,;"]+\.[^\s@<>,;"]+>?$/;

const listOf = (value) => (value === undefined || value === null ? [] : Array.isArray(value) ? value : [value]);
const hasBreak = (text) => /[\r\n]/.test(text);

/** { mail } in the shape the box keeps, or { error: [status, name, message] } as the API answers it. */
export function validateMail(input, { batch = false } = {}) {
  if (typeof input !== 'object' || input === null || Array.isArray(input)) {
    return { error: [422, 'validation_error', 'The mail is not an object.'] };
  }
  for (const field of ['from', 'to', 'subject']) {
    if (listOf(input[field]).length === 0)
      return { error: [422, 'missing_required_field', `Missing \`${field}\` field.`] };
  }
  if (input.html === undefined && input.text === undefined) {
    return { error: [422, 'missing_required_field', 'Missing `html` or `text` field.'] };
  }
  const people = {
    to: listOf(input.to),
    cc: listOf(input.cc),
    bcc: listOf(input.bcc),
    reply_to: listOf(input.reply_to),
  };
  if (typeof input.from !== 'string' || !ADDRESS.test(input.from)) {
    return {
      error: [
        422,
        'invalid_from_address',
        'Invalid `from` field. Use `email@example.com` or `Name <email@example.com>`.',
      ],
    };
  }
  for (const [field, addresses] of Object.entries(people)) {
    if (
      addresses.length > MOST_RECIPIENTS ||
      addresses.some((each) => typeof each !== 'string' || !ADDRESS.test(each))
    ) {
      return { error: [422, 'validation_error', `Invalid \`${field}\` field.`] };
    }
  }
  if (typeof input.subject !== 'string' || hasBreak(input.subject)) {
    return { error: [422, 'validation_error', 'Invalid `subject` field.'] };
  }
  const headers = Object.entries(input.headers ?? {});
  if (headers.some(([name, value]) => !/^[!-9;-~]+$/.test(name) || typeof value !== 'string' || hasBreak(value))) {
    return { error: [422, 'validation_error', 'Invalid `headers` field.'] };
  }
  const attachments = listOf(input.attachments);
  if (batch && (attachments.length > 0 || input.scheduled_at !== undefined)) {
    return { error: [422, 'validation_error', 'A batch takes neither `attachments` nor `scheduled_at`.'] };
  }
  const whole = ({ content, filename }) => typeof filename === 'string' && !hasBreak(filename) && isBase64(content);
  if (!attachments.every(whole)) {
    return { error: [422, 'invalid_attachment', 'Every attachment needs a `filename` and base64 `content`.'] };
  }
  const { from, subject, html = null, text = null, tags = [] } = input;
  const kept = attachments.map(({ filename, content, content_type }) => ({
    filename,
    content,
    content_type: content_type ?? 'application/octet-stream',
    bytes: Buffer.from(content, 'base64').length,
  }));
  return { mail: { from, ...people, subject, html, text, tags, headers: input.headers ?? {}, attachments: kept } };
}

const isBase64 = (text) =>
  typeof text === 'string' && text.length % 4 === 0 && text.length > 0 && /^[A-Za-z0-9+/]*={0,2}$/.test(text);
