import { Link, NavLink, useNavigate } from 'react-router-dom';
import type { SessionUser } from '../../../shared/schemas/session.ts';
import { buttonLook } from '../../components/button.tsx';
import { Icon } from '../../components/icon.tsx';
import { Menu, MenuItem } from '../../components/menu.tsx';
import { WordMark } from '../../components/mark.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { classNames } from '../../lib/class-names.ts';
import { paths } from '../paths.ts';
import { HeaderClock } from './header-clock.tsx';
import { NAVIGATION } from './navigation.ts';
import { PersonMenu } from './person-menu.tsx';
import { StationSwitch } from './station-switch.tsx';

const link = ({ isActive }: { isActive: boolean }): string =>
  classNames(
    'flex items-center border-b-2 pt-0.5 text-body whitespace-nowrap',
    isActive
      ? 'border-ink font-semibold text-ink'
      : 'border-transparent text-ink-muted hover:text-ink',
  );

export function Header({ user }: { user: SessionUser }) {
  const { mayEver } = useMay();
  const entries = NAVIGATION.filter(({ needs }) => mayEver(needs));
  return (
    <header className="sticky top-0 z-30 flex min-h-13 flex-wrap items-stretch gap-x-4 border-b border-line bg-surface pl-5 desk:gap-x-7">
      <Link
        to={paths.today}
        className="flex items-center rounded-mark"
        aria-label="Skysheaf, today"
      >
        <WordMark />
      </Link>
      <nav aria-label="Pages" className="hidden items-stretch gap-x-4 drawer:flex desk:gap-x-5">
        {entries.map(({ to, word }) => (
          <NavLink key={to} to={to} className={link}>
            {word}
          </NavLink>
        ))}
      </nav>
      <SmallNavigation entries={entries} />
      <div className="ml-auto flex min-w-0 flex-wrap items-stretch justify-end">
        <div className="flex items-center gap-4 pr-4">
          <StationSwitch />
          <HeaderClock />
        </div>
        <PersonMenu user={user} />
      </div>
    </header>
  );
}

function SmallNavigation({ entries }: { entries: readonly (typeof NAVIGATION)[number][] }) {
  const navigate = useNavigate();
  return (
    <nav aria-label="Pages, in a menu" className="flex items-center drawer:hidden">
      <Menu
        buttonClassName={buttonLook('outline', 'small')}
        face={
          <>
            <Icon name="menu" />
            Pages
          </>
        }
      >
        {entries.map(({ to, word }) => (
          <MenuItem key={to} onSelect={() => void navigate(to)}>
            {word}
          </MenuItem>
        ))}
      </Menu>
    </nav>
  );
}
