import { Fragment, type ReactElement } from 'react';

const address = /(https?:\/\/[^\s<>()]+)/g;

/** The words of a mail with its links made to work. Only the text part is shown: the HTML of a mail is not let into the page. */
export function MailText({ text }: { text: string }): ReactElement {
  return (
    <p className="m-text">
      {text.split(address).map((part, index) => {
        if (!/^https?:\/\//.test(part)) {
          return <Fragment key={index}>{part}</Fragment>;
        }
        const url = URL.canParse(part) ? new URL(part) : null;
        // A link of our own stays in this page, whatever name the server goes by.
        return <a key={index} className="d-link" data-kind="inline" href={url === null ? part : `${url.pathname}${url.search}`}>{part}</a>;
      })}
    </p>
  );
}
