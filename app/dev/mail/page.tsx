import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { FolderMails } from "@/components/identity/folder-mails";
import { publicContext } from "@/lib/http/page-context";
import { listFolderMail } from "@/lib/mail/queries";

export const metadata: Metadata = { title: "Local mail" };

/** The mails of the demo and of development. Where mail goes to a mail server there is no such page. */
export default async function LocalMailPage() {
  await publicContext();
  const mails = listFolderMail();
  if (mails === null) notFound();
  return (
    <main id="content" className="mx-auto w-full max-w-3xl px-4 py-8">
      <h1 className="text-2xl wide:text-3xl">Local mail</h1>
      <p className="mt-1 mb-6 text-soft">
        What this copy of the program would have mailed, newest first. A mail takes about a second
        to arrive; reload the page.
      </p>
      <FolderMails mails={mails} />
    </main>
  );
}
