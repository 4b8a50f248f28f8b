import { EmptyState } from "@/components/ui/empty-state";
import { Ticket } from "@/components/ui/ticket";
import type { FolderMail } from "@/lib/mail/queries";

/** A line that is an address becomes a link; everything else stays as it was written. */
function MailLine({ line }: { line: string }) {
  return /^https?:\/\/\S+$/.test(line) ? (
    <a href={line} className="link break-all">
      {line}
    </a>
  ) : (
    <>{line}</>
  );
}

/** The mails that a local folder caught, newest first. */
export function FolderMails({ mails }: { mails: readonly FolderMail[] }) {
  if (mails.length === 0) {
    return (
      <EmptyState title="No mail yet">Invite somebody, or use “Forgotten password”.</EmptyState>
    );
  }
  return (
    <ol className="flex flex-col gap-4">
      {mails.map((mail) => (
        <Ticket
          as="li"
          key={mail.id}
          stub={
            <>
              <h2 className="text-lg break-words">{mail.subject}</h2>
              <p className="text-sm break-words text-soft">
                To {mail.to},{" "}
                <time dateTime={mail.at}>{mail.at.slice(0, 16).replace("T", " ")} UTC</time>
              </p>
            </>
          }
        >
          <div className="break-words whitespace-pre-wrap">
            {mail.body.split("\n").map((line, at) => (
              // Lines of one mail never change places.
              <div key={at} className="min-h-6">
                <MailLine line={line} />
              </div>
            ))}
          </div>
        </Ticket>
      ))}
    </ol>
  );
}
