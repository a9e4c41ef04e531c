import { type ReactNode, useEffect } from 'react';
import { NavLink } from 'react-router-dom';

export interface PageLink {
  to: string;
  label: string;
}

interface Props {
  light: 'night' | 'day';
  title: string;
  /** Said beside the name of the program: show, date, place. */
  where?: string;
  links?: readonly PageLink[];
  /** Right end of the header, such as the account. */
  end?: ReactNode;
  /** Rehearsal wears stripes so that nobody takes it for live. */
  striped?: boolean;
  children: ReactNode;
}

/** A page of the program: header with where one is, ways to its neighbours, and the page's own light. */
export const Page = ({ light, title, where, links = [], end, striped = false, children }: Props) => {
  useEffect(() => {
    document.title = `${title} · Lampyrid`;
    document.documentElement.dataset.light = light;
  }, [title, light]);
  return (
    <div
      data-light={light}
      className={`min-h-dvh bg-(--ground) text-(--text) ${striped ? 'rehearsal-frame' : ''}`}
    >
      <header className="flex flex-wrap items-center gap-x-6 gap-y-1 border-b border-(--line) px-4 pt-2">
        <NavLink to="/shows" className="flex min-h-11 items-center gap-2 text-lg font-extrabold">
          <span aria-hidden="true" className="h-3 w-3 rounded-full bg-(--firefly)" />
          Lampyrid
        </NavLink>
        {where && <p className="min-w-0 truncate text-(--quiet)">{where}</p>}
        <nav aria-label="Pages" className="ml-auto flex max-w-full gap-1 overflow-x-auto">
          {links.map((link) => (
            <NavLink
              key={link.to}
              to={link.to}
              end
              className="flex min-h-11 items-center border-b-2 border-transparent px-2.5 whitespace-nowrap text-(--quiet) aria-[current=page]:border-(--firefly) aria-[current=page]:font-bold aria-[current=page]:text-(--text)"
            >
              {link.label}
            </NavLink>
          ))}
        </nav>
        {end}
      </header>
      <main className="mx-auto max-w-[96rem] p-4">
        <h1 className="sr-only">{title}</h1>
        {children}
      </main>
    </div>
  );
};
