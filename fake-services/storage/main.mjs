import { startStorage } from './server.mjs';

const { S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY, S3_REGION, STORAGE_FOLDER, STORAGE_PORT } = process.env;
const { url } = await startStorage({
  folder: STORAGE_FOLDER,
  port: Number(STORAGE_PORT),
  accessKeyId: S3_ACCESS_KEY_ID,
  secretAccessKey: S3_SECRET_ACCESS_KEY,
  region: S3_REGION,
});
console.log(`store on ${url}`);
