import { startMail } from './server.mjs';

const { RESEND_API_KEY, MAIL_FOLDER, MAIL_PORT } = process.env;
const { url } = await startMail({ folder: MAIL_FOLDER, port: Number(MAIL_PORT), apiKey: RESEND_API_KEY });
console.log(`mailbox on ${url}`);
