import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { KeptMail } from '#shared/api/accounts';
import { Empty } from '@/components/Empty';
import { Loading } from '@/components/Loading';
import { Page } from '@/components/Page';
import { Problem } from '@/components/Problem';
import { mailParts } from '@/features/accounts/mailParts';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';
import { crewLinks } from '@/lib/showLinks';
import { momentWords } from '@/lib/words';

const Mail = ({ mail }: { mail: KeptMail }) => {
  const parts = useMemo(
    () => mailParts(mail.text).map((part, index) => ({ ...part, key: `${index} ${part.kind}` })),
    [mail.text],
  );
  return (
    <li className="rounded-2xl border border-(--line) bg-(--raised) p-5">
      <p className="flex flex-wrap justify-between gap-2 text-sm text-(--quiet)">
        <span>to {mail.to}</span>
        <time dateTime={mail.at}>{momentWords(mail.at)}</time>
      </p>
      <h2 className="mb-2 text-lg font-bold">{mail.subject}</h2>
      <p className="break-words whitespace-pre-wrap">
        {parts.map((part) =>
          part.kind === 'link' ? (
            <a key={part.key} href={part.text} className="break-all text-(--moonlight) underline">
              {part.text}
            </a>
          ) : (
            <span key={part.key}>{part.text}</span>
          ),
        )}
      </p>
    </li>
  );
};

/** The mailbox of this machine: what would have been mailed, kept and readable. */
export const MailPage = () => {
  const mail = useQuery({
    queryKey: queryKeys.mail,
    queryFn: () => api.get<KeptMail[]>('/api/mail'),
    refetchInterval: 3000,
  });
  return (
    <Page light="day" title="Mail kept here" links={crewLinks}>
      <p className="mb-4 max-w-prose text-(--quiet)">
        This is the mailbox of this machine. No mail server is set, so what Lampyrid would send stays here.
      </p>
      {mail.isPending && <Loading label="Mail" />}
      {mail.error && <Problem problem={mail.error} onRetry={() => void mail.refetch()} />}
      {mail.data?.length === 0 && (
        <Empty title="No mail yet">Invitations and password links appear here.</Empty>
      )}
      <ul className="flex max-w-3xl flex-col gap-3">
        {mail.data?.map((one) => (
          <Mail key={one.id} mail={one} />
        ))}
      </ul>
    </Page>
  );
};
