import { buttonLook } from '../../components/button.tsx';
import { Menu, MenuChoice } from '../../components/menu.tsx';
import { Icon } from '../../components/icon.tsx';
import { useStation } from '../../hooks/use-station.ts';

/** Which station the pages are about; a word where there is only one. */
export function StationSwitch() {
  const { station, stations, choose } = useStation();
  if (!station) return null;
  if (stations.length === 1)
    return <span className="hidden text-table text-ink-muted narrow:inline">{station.name}</span>;
  return (
    <Menu
      buttonClassName={buttonLook('quiet', 'small', 'max-w-36 desk:max-w-60')}
      buttonProps={{ 'aria-label': `Station ${station.name}, choose another` }}
      face={
        <>
          <span className="truncate">{station.name}</span>
          <Icon name="chevronDown" size={12} />
        </>
      }
    >
      <MenuChoice
        label="Station"
        value={station.id}
        onChange={choose}
        options={stations.map(({ id, name }) => ({ value: id, word: name }))}
      />
    </Menu>
  );
}
