import { createTransport } from "nodemailer";
import { config } from "./config";
import { logError } from "./log";

/** Sends a plain-text mail where SMTP is set; a failure is logged, never thrown: the link is shown on screen as well. */
export async function sendMail(to: string, subject: string, text: string): Promise<boolean> {
  const { SMTP_URL, MAIL_FROM } = config();
  if (!SMTP_URL) return false;
  try {
    await createTransport(SMTP_URL, { connectionTimeout: 5_000 } as never).sendMail({
      from: MAIL_FROM,
      to,
      subject,
      text,
    });
    return true;
  } catch (error) {
    logError("mail", error);
    return false;
  }
}
