import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';

export interface Letter {
  id: string;
  at: string;
  to: string;
  subject: string;
  text: string;
}

/** Letters that stayed on this machine. Their links can be followed, which is what they are here for. */
export function LettersView({ letters }: { letters: Letter[] }) {
  return (
    <div className="flex flex-col gap-5">
      <Sentence
        before="Letters"
        phrases={[
          { text: 'No mail server is set up here,', tone: 'strong' },
          ' so letters to people of this holding stay on this machine and can be read by whoever may invite.',
        ]}
      />
      <div>
        <ButtonLink href="/people">Back to People</ButtonLink>
      </div>
      {letters.length === 0 ? (
        <Empty title="No letter yet.">
          <p>Invite somebody, or ask for a new password at the door; the letter then lies here.</p>
        </Empty>
      ) : null}
      {letters.map((letter) => (
        <Panel key={letter.id} title={letter.subject} note={`to ${letter.to}`}>
          <time dateTime={letter.at} className="font-mono text-[0.85rem] text-soft">
            {letter.at.slice(0, 16).replace('T', ' ')} UTC
          </time>
          <p className="mt-1 max-w-prose break-words whitespace-pre-line">{linked(letter.text)}</p>
        </Panel>
      ))}
    </div>
  );
}

/** Only http(s) addresses become links, each opened where it points: the letters are our own text round one address. */
function linked(text: string) {
  return text.split(/(https?:\/\/[^\s]+)/).map((part, place) =>
    place % 2 === 1 ? (
      <a key={place} href={part} className="break-all underline underline-offset-4">
        {part}
      </a>
    ) : (
      part
    ),
  );
}
