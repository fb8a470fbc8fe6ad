CREATE TABLE `result_parts` (
	`key` varchar(64) NOT NULL,
	`part` varchar(20) NOT NULL,
	`state` enum('computing','computed','failed') NOT NULL DEFAULT 'computing',
	`values` json,
	`errors` json NOT NULL,
	`asked_at` datetime(3) NOT NULL DEFAULT current_timestamp(3),
	CONSTRAINT `result_parts_key_part_pk` PRIMARY KEY(`key`,`part`)
);
--> statement-breakpoint
ALTER TABLE `results` MODIFY COLUMN `surplus_db` double GENERATED ALWAYS AS (coalesce(json_value(`values`, '$.surplusDb.low'), json_value(`values`, '$.surplusDb'))) STORED;--> statement-breakpoint
CREATE INDEX `result_parts_state` ON `result_parts` (`state`,`asked_at`);