CREATE INDEX `candidates_summary` ON `candidates` (`study_id`,`deleted_at`,`result_key`,`position`);--> statement-breakpoint
CREATE INDEX `results_summary` ON `results` (`key`,`passes`,`surplus_db`);