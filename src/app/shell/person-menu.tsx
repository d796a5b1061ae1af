import type { SessionUser } from '../../../shared/schemas/session.ts';
import { Icon } from '../../components/icon.tsx';
import { Menu, MenuChoice, MenuItem, MenuRule } from '../../components/menu.tsx';
import { roleWords } from '../../hooks/use-session.ts';
import { chooseTheme, useThemeChoice } from '../../lib/theme.ts';
import { useSignOut } from '../../queries/session-queries.ts';

export function PersonMenu({ user }: { user: SessionUser }) {
  const theme = useThemeChoice();
  const signOut = useSignOut();
  return (
    <div className="flex items-stretch border-l border-line">
      <Menu
        buttonClassName="flex items-center gap-3 px-4 text-left hover:bg-raised focus-visible:-outline-offset-2"
        face={
          <>
            <span className="hidden flex-col narrow:flex">
              <span className="font-semibold whitespace-nowrap">{user.name}</span>
              <span className="text-caption whitespace-nowrap text-ink-muted">
                {roleWords(user.roles)}
              </span>
            </span>
            <span className="font-semibold narrow:hidden">{user.name.split(' ')[0]}</span>
            <Icon name="chevronDown" className="text-ink-muted" />
          </>
        }
      >
        <MenuChoice
          label="Theme"
          value={theme}
          onChange={chooseTheme}
          options={[
            { value: 'system', word: 'As the system', icon: 'system' },
            { value: 'light', word: 'Light', icon: 'sun' },
            { value: 'dark', word: 'Dark', icon: 'moon' },
          ]}
        />
        <MenuRule />
        <MenuItem icon="signOut" onSelect={() => signOut.mutate()}>
          Sign out
        </MenuItem>
      </Menu>
    </div>
  );
}
