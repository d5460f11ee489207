const groups: { name: string; swatches: [string, string][] }[] = [
  {
    name: 'Ground and ink',
    swatches: [
      ['chalk', 'bg-chalk'],
      ['silt', 'bg-silt'],
      ['white', 'bg-white'],
      ['humus', 'bg-humus'],
      ['clay', 'bg-clay'],
      ['fallow', 'bg-fallow'],
      ['peat', 'bg-peat'],
    ],
  },
  {
    name: 'Line and words',
    swatches: [
      ['gley', 'bg-gley'],
      ['gley deep', 'bg-gley-deep'],
      ['gley wash', 'bg-gley-wash'],
      ['ochre', 'bg-ochre'],
      ['ochre wash', 'bg-ochre-wash'],
      ['iron', 'bg-iron'],
      ['iron wash', 'bg-iron-wash'],
      ['lichen', 'bg-lichen'],
      ['lichen wash', 'bg-lichen-wash'],
    ],
  },
  {
    name: 'Soil column',
    swatches: [
      ['1', 'bg-horizon-1'],
      ['2', 'bg-horizon-2'],
      ['red', 'bg-core-red'],
      ['4', 'bg-horizon-4'],
      ['3', 'bg-horizon-3'],
      ['5', 'bg-horizon-5'],
    ],
  },
  {
    name: 'Series',
    swatches: [
      ['1 deep water', 'bg-series-1'],
      ['2 burnt ochre', 'bg-series-2'],
      ['3 rain', 'bg-series-3'],
      ['4 red horizon', 'bg-series-4'],
      ['5 heather', 'bg-series-5'],
      ['6 humus', 'bg-series-6'],
    ],
  },
];

export function ColoursSection() {
  return (
    <div className="grid gap-6">
      {groups.map((group) => (
        <div key={group.name}>
          <h3 className="mb-2 text-lg">{group.name}</h3>
          <ul className="grid grid-cols-[repeat(auto-fill,minmax(6.5rem,1fr))] gap-3">
            {group.swatches.map(([name, look]) => (
              <li key={name} className="text-sm">
                <span className={`block h-14 border border-fallow ${look}`} />
                {name}
              </li>
            ))}
          </ul>
        </div>
      ))}
    </div>
  );
}
