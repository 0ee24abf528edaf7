package main

import "github.com/spf13/cobra"

func (a *app) compareCommand() *cobra.Command { return &cobra.Command{Use: "compare"} }
