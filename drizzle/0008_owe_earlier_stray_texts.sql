-- Texts of unknown numbers that came before anybody owed them. One number serves one organisation: the first founded.
INSERT INTO `stray_texts` (`entry_id`, `organisation_id`, `priority`, `due_at`)
SELECT `e`.`id`, `o`.`id`, if(`e`.`is_alarming`, 0, 5), if(`e`.`is_alarming`, `e`.`at`, date_add(`e`.`at`, interval 2 hour))
FROM `thread_entries` `e`
JOIN (SELECT `id` FROM `organisations` ORDER BY `created_at`, `id` LIMIT 1) `o`
WHERE `e`.`direction` = 'in' AND `e`.`follow_up_id` IS NULL AND coalesce(`e`.`understood_as`, '') NOT IN ('stop', 'thanks')
	AND NOT EXISTS (SELECT 1 FROM `carers` `c` WHERE `c`.`phone` = `e`.`phone`);
