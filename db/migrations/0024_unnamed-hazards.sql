-- Mixes saved while a private part was still named in their hazards: its name, of now and of earlier, gives way to the words for an unnamed part, as at saving.
-- Parts of parts count too. Keys of the library's own cautions stay as they are. Letters beyond ASCII are found only as they were written.
WITH RECURSIVE held(version_id, material_id, private) AS (
  SELECT mix.version_id, part.material_id, part.private FROM mix JOIN mix_part part ON part.mix_id = mix.id
  UNION
  SELECT held.version_id, part.material_id, part.private FROM held JOIN mix ON mix.material_id = held.material_id JOIN mix_part part ON part.mix_id = mix.id
), called(version_id, name) AS (
  SELECT held.version_id, material.name FROM held JOIN material ON material.id = held.material_id WHERE held.private = 1
  UNION
  SELECT held.version_id, json_extract(audit."before", '$.name') FROM held JOIN audit ON audit.table_name = 'material' AND audit.row_id = held.material_id
  WHERE held.private = 1 AND json_extract(audit."before", '$.name') <> ''
), numbered(version_id, n, name) AS (
  SELECT version_id, row_number() OVER (PARTITION BY version_id ORDER BY length(name) DESC, name), name FROM called
), walk(version_id, at, n, done, rest) AS (
  SELECT version.id, said.key, 1, '', said.value FROM material_version version, json_each(version.cautions) said
  WHERE version.id IN (SELECT version_id FROM called)
    AND said.value NOT IN ('flames', 'fan', 'phones', 'pouring', 'aerosol', 'oily rags', 'waste can', 'mixed residue', 'exotherm', 'glue pot', 'vapour', 'airing', 'water vapour', 'dust mask', 'sleeping room', 'children', 'symptoms', 'isocyanate', 'epoxy skin', 'gloves', 'part-cured dust', 'cyanoacrylate', 'sanding dust', 'casein lime', 'ammonia', 'old paint', 'green cloth', 'mould', 'metal coating', 'paint stripper', 'ask first', 'blush', 'amine blush', 'forbidden middle', 'wax early', 'over damp paint', 'cover slow oil', 'blocking', 'skin hides wet', 'old stock', 'goes off', 'one try', 'keep warm', 'dry air')
  UNION ALL
  SELECT walk.version_id, walk.at,
    iif(instr(lower(rest), lower(name)) > 0, walk.n, walk.n + 1),
    iif(instr(lower(rest), lower(name)) > 0, done || substr(rest, 1, instr(lower(rest), lower(name)) - 1)
      || iif(done || substr(rest, 1, instr(lower(rest), lower(name)) - 1) = ''
        OR (substr(done || substr(rest, 1, instr(lower(rest), lower(name)) - 1), -1) IN (' ', char(10))
          AND substr(rtrim(done || substr(rest, 1, instr(lower(rest), lower(name)) - 1), ' ' || char(10)), -1) IN ('.', '!', '?')), 'A part of this mix', 'a part of this mix'), ''),
    iif(instr(lower(rest), lower(name)) > 0, substr(rest, instr(lower(rest), lower(name)) + length(name)), done || rest)
  FROM walk JOIN numbered ON numbered.version_id = walk.version_id AND numbered.n = walk.n
), unnamed(version_id, at, said) AS (
  SELECT version_id, at, rest FROM walk WHERE n > (SELECT max(n) FROM numbered WHERE numbered.version_id = walk.version_id)
)
UPDATE material_version SET cautions = (
  SELECT json_group_array(said) FROM (
    SELECT coalesce(unnamed.said, each.value) AS said FROM json_each(material_version.cautions) each LEFT JOIN unnamed ON unnamed.version_id = material_version.id AND unnamed.at = each.key ORDER BY each.key
  )
) WHERE id IN (SELECT version_id FROM unnamed);
