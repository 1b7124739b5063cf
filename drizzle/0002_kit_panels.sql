-- Panels and flags are a kind of their own; they were modifiers of the shape "panel".
update "kit_item"
set "input" = jsonb_set(
  "input",
  '{body}',
  jsonb_build_object(
    'kind', 'panel',
    'numbers', jsonb_build_object(
      'use', case when "input"->>'name' ilike '%black%' then 'flag' else 'panel' end,
      'widthM', greatest(0.01, least(10, ("input"#>>'{body,numbers,widthM}')::numeric)),
      'heightM', greatest(0.01, least(10, ("input"#>>'{body,numbers,heightM}')::numeric)),
      'colour', case
        when "input"->>'name' ilike '%black%' then '#1f1c1a'
        when "input"->>'name' ilike '%silver%' then '#d9dbde'
        else '#ffffff'
      end,
      'massKg', "input"#>'{body,numbers,massKg}'
    )
  )
)
where "input"#>>'{body,kind}' = 'modifier' and "input"#>>'{body,numbers,shape}' = 'panel';
